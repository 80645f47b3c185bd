import { isSameUnit, unitInWords } from './unit-words';

describe('isSameUnit', () => {
  it.each([
    ['m', 'm'],
    ['Metres', 'm'],
    ['hrs.', 'hours'],
    ['m²', 'm2'],
    ['knots', 'knots'],
  ])('takes %s for %s', (typed, unit) => {
    expect(isSameUnit(typed, unit)).toBe(true);
  });

  it.each([
    ['ft', 'm'],
    ['mm', 'm'],
    ['kg', 't'],
    ['min', 'h'],
    ['', 'm'],
  ])('does not take %s for %s', (typed, unit) => {
    expect(isSameUnit(typed, unit)).toBe(false);
  });
});

describe('unitInWords', () => {
  it.each([
    ['m', 'metres'],
    ['t', 'tonnes'],
    ['m²', 'square metres'],
    ['knots', 'knots'],
  ])('reads %s as %s', (unit, words) => {
    expect(unitInWords(unit)).toBe(words);
  });
});
