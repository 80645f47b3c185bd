import { EstimatesError, FailureCode, FailureDetails } from '../api/estimates-error';
import { failureWords, FormFailure, notSetUp } from './failure-words';

const ORIGIN = 'https://pell-and-tarn.example';

function words(code: FailureCode, details: FailureDetails = {}): FormFailure {
  return failureWords(new EstimatesError(code, 'Title of the problem', details), ORIGIN);
}

describe('failureWords', () => {
  it('tells the keeper of a site that is not listed which origin to have listed', () => {
    const { text, forSite } = words('site-not-listed', { detail: 'This site is not listed for the key.' });
    expect(text).toBe('Please tell the people who keep this site.');
    expect(forSite).toContain('This site is not listed for the key.');
    expect(forSite).toContain(`list ${ORIGIN} for this key`);
  });

  it('names the same cause when no answer came, because a browser hides a refused site', () => {
    const { text, forSite } = words('unreachable');
    expect(text).toContain('try again');
    expect(forSite).toContain(ORIGIN);
  });

  it('says how long to wait when there were too many calls', () => {
    expect(words('rate-exceeded', { detail: 'Wait a little.', retryAfterSeconds: 12 })).toMatchObject({
      text: 'Wait a little.',
      waitSeconds: 12,
    });
    expect(words('rate-exceeded').waitSeconds).toBeGreaterThan(0);
  });

  it.each<FailureCode>([
    'unreachable',
    'site-not-listed',
    'quota-exceeded',
    'nothing-in-force',
    'key-revoked',
    'internal',
  ])('asks nobody to wait for %s', (code) => {
    expect(words(code).waitSeconds).toBeNull();
  });

  it("shows the desk's own explanation and its reference", () => {
    expect(words('nothing-in-force', { detail: 'No edition is in force.', requestId: 'r1' })).toMatchObject({
      text: 'No edition is in force.',
      requestId: 'r1',
    });
    expect(words('unavailable').text).toBe('Title of the problem');
  });

  it('keeps the cause of a bad key from the visitor and tells it to the keeper of the site', () => {
    expect(words('key-expired', { detail: 'The key ended on 1 May.' })).toMatchObject({
      text: 'Please tell the people who keep this site.',
      forSite: 'The key ended on 1 May.',
    });
  });

  it('gives the status of an answer that could not be read', () => {
    expect(words('not-understood', { status: 502 }).text).toContain('status 502');
  });
});

describe('notSetUp', () => {
  it('names the attributes that are missing', () => {
    expect(notSetUp(['key']).forSite).toBe('The element needs the attribute “key”.');
    expect(notSetUp(['key', 'service']).forSite).toBe('The element needs the attributes “key” and “service”.');
  });
});
