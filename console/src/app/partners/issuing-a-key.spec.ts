import type { Partner, SessionPerson } from '../api/contract';
import { Room } from '../ui/testing/room';
import { partnersRoutes } from './partners.routes';
import { boatPages, pellAndTarn } from './testing/pell-and-tarn';

const PATH = '/api/partners/partner0pell';
const KEYS = `${PATH}/keys`;
const ESTIMATORS = '/api/estimators';
const KEY = 'tbk_Ab3dEf7h_secret';

const edition = (slug: string) => ({ id: `edition0${slug}`, number: 4 });
const estimators = {
  items: [
    { slug: 'refit-labour', name: 'Refit labour', inForce: edition('refit') },
    { slug: 'crane-time', name: 'Crane time', inForce: null },
  ],
  total: 2,
};

async function openForm(person?: Partial<SessionPerson>, partner?: Partial<Partner>): Promise<Room> {
  const room = await Room.open({ path: 'partners', routes: partnersRoutes, address: '/partners/partner0pell', person });
  await room.answer(PATH, { ...pellAndTarn, ...partner });
  await room.press('Issue a key');
  return room;
}

async function issue(kind: 'Partner key' | 'Embed key', person?: Partial<SessionPerson>): Promise<Room> {
  const room = await openForm(person);
  await room.answer(ESTIMATORS, estimators);
  await room.tick(kind);
  await room.type('Label', 'Quote server');
  await room.press('Issue the key');
  const details = {
    ...boatPages,
    id: 'key000000new',
    kind: kind === 'Embed key' ? 'embed' : 'partner',
    label: 'Quote server',
    estimators: 'all',
  };
  await room.answer(KEYS, { id: details.id, key: KEY, details }, 'POST');
  return room;
}

describe('filling in a key', () => {
  it('explains both kinds', async () => {
    const room = await openForm();
    expect(room.text).toContain('Secret. For a partner’s server');
    expect(room.text).toContain('answered only when the call comes from a listed site');
  });

  it('says that an embed key needs a site where none is listed', async () => {
    const room = await openForm({}, { sites: [] });
    await room.tick('Embed key');
    expect(room.text).toContain('list one first');
  });

  it('sends the estimators chosen and the limits typed', async () => {
    const room = await openForm();
    await room.answer(ESTIMATORS, estimators);
    await room.tick('Partner key');
    await room.type('Label', 'Quote server');
    await room.tick('Chosen estimators');
    await room.tick('Crane time');
    await room.type('Calls a minute', '120');
    await room.type('Estimates a month', '20,000');
    await room.press('Issue the key');
    const call = await room.answer(
      KEYS,
      { id: boatPages.id, key: KEY, details: { ...boatPages, id: 'key000000new' } },
      'POST',
    );
    expect(call.request.body).toEqual({
      kind: 'partner',
      label: 'Quote server',
      estimators: ['crane-time'],
      perMinute: 120,
      monthlyQuota: 20_000,
      expiresAt: null,
    });
  });

  it('says beside each field what is wrong, and sends nothing', async () => {
    const room = await openForm();
    await room.type('Calls a minute', 'many');
    await room.press('Issue the key');
    expect(room.text).toContain('Choose a kind of key');
    expect(room.complaintOf('Label')).toContain('Enter a label');
    expect(room.complaintOf('Calls a minute')).toContain('whole number');
    room.expectNoCall(KEYS);
  });

  it('keeps what was typed when the service refuses, and says why beside the field', async () => {
    const room = await openForm();
    await room.tick('Embed key');
    await room.type('Label', 'Quote page');
    await room.press('Issue the key');
    const errors = [{ detail: 'List the site first.', pointer: '#/kind' }];
    await room.refuse(KEYS, { errors }, 'POST');
    expect(room.page.querySelector('fieldset.tb-complained')?.textContent).toContain('List the site first.');
    expect(room.valueOf('Label')).toBe('Quote page');
  });

  it('can read the estimators again when they could not be read', async () => {
    const room = await openForm();
    await room.tick('Chosen estimators');
    await room.refuse(ESTIMATORS, { status: 503, code: 'unavailable' });
    await room.press('Try again');
    await room.answer(ESTIMATORS, estimators);
    expect(room.has('label', 'Crane time')).toBe(true);
  });
});

describe('the one look at a key', () => {
  it('shows the key with a warning, and puts it away when it has been copied', async () => {
    const room = await issue('Partner key');
    expect(room.text).toContain('It is shown this once.');
    expect(room.page.querySelector('[aria-label="The key"]')?.textContent).toBe(KEY);
    await room.press('I have copied the key');
    expect(room.text).not.toContain(KEY);
    expect(room.text).toContain('Quote server');
  });

  it('gives a server two commands to try, the second with a typical case of the edition in force', async () => {
    const room = await issue('Partner key');
    await room.answer(ESTIMATORS, estimators);
    const inputSchema = { type: 'object', properties: { length: { type: 'number', 'x-typical': 11.8 } } };
    await room.answer('/api/editions/edition0refit', { ...edition('refit'), inputSchema });
    expect(room.text).toContain(`curl ${location.origin}/v1/estimators \\`);
    expect(room.text).toContain(`--data '{"inputs":{"length":11.8}}'`);
  });

  it('gives a partner’s developer, who may not read editions, the first command only', async () => {
    const room = await issue('Partner key', { roles: ['partner-developer'], partnerId: 'partner0pell' });
    await room.answer(ESTIMATORS, estimators);
    room.expectNoCall('/api/editions/edition0refit');
    expect(room.has('[aria-label="List the estimators"]', 'curl')).toBe(true);
    expect(room.has('[aria-label="Ask for an estimate"]', 'curl')).toBe(false);
  });

  it('gives a page its markup, for the estimator that is chosen', async () => {
    const room = await issue('Embed key');
    await room.answer(ESTIMATORS, estimators);
    await room.choose('Estimator in the example', 'crane-time');
    expect(room.page.querySelector('[aria-label="For the page"]')?.textContent).toContain(
      `<tarebeam-form estimator="crane-time" key="${KEY}" service="${location.origin}"></tarebeam-form>`,
    );
  });
});
