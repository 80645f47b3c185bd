import { readHeader, unitOf } from './header';

describe('the header', () => {
  it('keeps names as they stand, but for the spaces around them', () => {
    expect(readHeader([' Length (m) ', 'hull'], 1)).toEqual(['Length (m)', 'hull']);
  });

  it('names the columns that are called alike, with the line', () => {
    expect(() => readHeader(['beam', 'hull', 'beam '], 3)).toThrow(/line 3 .*“beam”/);
  });

  it('refuses more columns than a table may have', () => {
    const names = Array.from({ length: 10_000 }, (_, column) => `column ${column}`);
    expect(() => readHeader(names, 1)).toThrow(/10000 columns; 2000 is the most/);
  });

  it.each([
    ['length (m)', 'm'],
    ['Displacement [t]', 't'],
    ['area (m²)', 'm²'],
    ['speed (km/h)', 'km/h'],
    ['moisture (%)', '%'],
    ['time (short tons)', 'short tons'],
    ['score (0-10)', null],
    ['year', null],
    ['remark (see page two below)', null],
  ])('finds the unit of %s', (name, unit) => {
    expect(unitOf(name)).toBe(unit);
  });
});
