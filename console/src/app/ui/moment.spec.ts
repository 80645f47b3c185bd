import { formatRecordedDay, formatWait } from './moment';

describe('formatRecordedDay', () => {
  it('counts days from 1970-01-01 whatever the time zone', () => {
    expect(formatRecordedDay(0)).toBe('1 Jan 1970');
    expect(formatRecordedDay(20_760)).toBe('3 Nov 2026');
  });
});

describe('formatWait', () => {
  it.each([
    [1, '1 second'],
    [45, '45 seconds'],
    [61, '2 minutes'],
    [3600, '60 minutes'],
  ])('rounds %d seconds up to %s', (seconds, expected) => {
    expect(formatWait(seconds)).toBe(expected);
  });
});
