import { readNumber } from './read-number';

describe('reading a typed number', () => {
  it.each([
    ['12.5', 12.5],
    [' 12.5 ', 12.5],
    ['12,5', 12.5],
    ['1,234,567.5', 1234567.5],
    ['1 234', 1234],
    ['−3', -3],
    ['.5', 0.5],
    ['1e-3', 0.001],
  ])('%s', (text, value) => {
    expect(readNumber(text)).toEqual({ value });
  });

  it('asks when the text could be two numbers', () => {
    expect(readNumber('1,234')).toEqual({ problem: '“1,234” could be two numbers. Write 1234 or 1.234.' });
  });

  it('refuses what is no number', () => {
    expect(readNumber('twelve')).toEqual({ problem: '“twelve” is not a number. Write it like 12.5.' });
    expect(readNumber('1e999')).toEqual({ problem: '“1e999” is too large a number.' });
  });

  it('knows an empty field', () => {
    expect(readNumber('   ')).toEqual({ empty: true });
  });
});
