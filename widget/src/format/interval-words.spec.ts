import { asSentence, intervalInWords, shareInWords } from './interval-words';

const options = { unit: 'hours', precision: { step: 1, endStep: 10 }, locale: 'en-GB' };
const words = (low: number | null, high: number | null): string =>
  intervalInWords({ level: 0.9, low, high }, options).replace(/\u00a0/g, ' ');

describe('intervalInWords', () => {
  it('says the share of cases and both ends, rounded as they deserve', () => {
    expect(words(438.2, 591.7)).toBe('nine of ten such cases come to between 440 and 590 hours');
  });
  it('says which end the records cannot bound', () => {
    expect(words(438.2, null)).toBe(
      'nine of ten such cases come to 440 hours or more; the records are too few to bound it above',
    );
    expect(words(null, 591.7)).toBe(
      'nine of ten such cases come to 590 hours or less; the records are too few to bound it below',
    );
  });
  it('says so where there is no interval', () => {
    expect(words(null, null)).toBe('the records are too few to say how far off this may be');
  });
});

describe('shareInWords', () => {
  it.each([
    [0.9, 'nine of ten'],
    [0.95, '19 of 20'],
    [0.8, 'eight of ten'],
    [0.5, 'half of'],
    [0.87, '87 of 100'],
    [0.995, '99.5 of 100'],
  ])('says %d as %s', (level, expected) => {
    expect(shareInWords(level)).toBe(expected);
  });
});

describe('asSentence', () => {
  it('begins with a capital and ends with a full stop', () => {
    expect(asSentence('nine of ten')).toBe('Nine of ten.');
  });
});
