import { readWholeNumber } from './whole-number';

const perMinute = { noun: 'Calls a minute', most: 100_000, optional: false };

describe('reading a whole number', () => {
  it.each([
    ['60', 60],
    ['20,000', 20_000],
    [' 20 000 ', 20_000],
  ])('reads %p as %p', (text, value) => {
    expect(readWholeNumber(text, perMinute)).toEqual({ value });
  });

  it.each(['1.5', '-3', 'many'])('refuses %p, saying what is wanted', (text) => {
    expect(readWholeNumber(text, perMinute)).toEqual({ complaint: 'Calls a minute must be a whole number, like 60' });
  });

  it.each(['0', '100001'])('refuses %p, naming both ends', (text) => {
    expect(readWholeNumber(text, perMinute)).toEqual({ complaint: 'Calls a minute must be between 1 and 100,000' });
  });

  it('reads nothing as no limit only where that is allowed', () => {
    expect(readWholeNumber('', { ...perMinute, optional: true })).toEqual({ value: null });
    expect(readWholeNumber('', perMinute)).toHaveProperty('complaint');
  });
});
