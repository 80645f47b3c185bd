import { typedNumber } from './typed-number';

describe('reading a typed number', () => {
  it.each([
    ['12.5', 12.5],
    [' 12,5 ', 12.5],
    ['1,234,567.5', 1234567.5],
    ['−3', -3],
    ['1e-3', 0.001],
    ['−2.5E4', -25000],
  ])('%s', (text, value) => {
    expect(typedNumber(text)).toEqual({ value });
  });

  it('passes over the unit of the field and asks about another', () => {
    expect(typedNumber('12.5 m', 'm')).toEqual({ value: 12.5 });
    expect(typedNumber('40 ft', 'm')).toEqual({ problem: '“ft” is not the unit here. Write the number in m.' });
  });

  it('asks when the text could be two numbers', () => {
    expect(typedNumber('1,234')).toHaveProperty('problem');
  });

  it('refuses what is no number, and knows an empty field', () => {
    expect(typedNumber('1..2')).toEqual({ problem: '“1..2” is not a number. Write it like 12.5.' });
    expect(typedNumber('1e999')).toHaveProperty('problem');
    expect(typedNumber('   ')).toEqual({ empty: true });
  });
});
