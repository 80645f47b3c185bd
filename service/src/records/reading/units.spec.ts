import { NumberReader } from './number-cell';
import { UnitReader } from './unit-cell';
import { conversionOf, converted, unitNamed, type Unit } from './units';

const named = (text: string): Unit => unitNamed(text) as Unit;
const convert = (value: number, from: string, to: string): number =>
  converted(value, conversionOf(named(from), named(to)));

describe('units', () => {
  // International yard and pound agreement (1959); SI Brochure, 9th edition, table 8; nautical mile: Monaco 1929.
  it.each([
    [1, 'ft', 'm', 0.3048],
    [1, 'inch', 'mm', 25.4],
    [1, 'yd', 'm', 0.9144],
    [1, 'mile', 'm', 1609.344],
    [1, 'nmi', 'km', 1.852],
    [1, 'lb', 'kg', 0.45359237],
    [1, 't', 'kg', 1000],
    [1, 'l', 'cm³', 1000],
    [1, 'ft³', 'l', 28.316846592],
    [1, 'd', 'h', 24],
    [1, 'week', 'd', 7],
  ])('%d %s is exactly %3$d %2$s', (value, from, to, expected) => {
    expect(convert(value, from, to)).toBe(expected);
  });

  it('convert whole centimetres to the number that one would write', () => {
    for (let value = 0; value < 1000; value++) expect(convert(value, 'cm', 'm')).toBe(Number(`${value}e-2`));
  });

  it('tell apart symbols that differ by case, and take words in any case', () => {
    expect(unitNamed('Mg')).toBeNull();
    expect(unitNamed('M')).toBeNull();
    expect(unitNamed('METRES')).toBe(unitNamed('m'));
    expect(unitNamed('KG')).toBe(unitNamed('kg'));
  });

  it('are not known where the word alone does not tell which is meant', () => {
    for (const word of ['ton', 'oz', 'gal', 'A', 'constructor', '']) expect(unitNamed(word)).toBeNull();
  });
});

describe('a cell with a unit', () => {
  const numbers = new NumberReader();
  const units = new UnitReader(numbers);

  it.each([
    ['12 m', 12, 'm'],
    ['12m', 12, 'm'],
    [' 40 ft. ', 40, 'ft'],
    ['12%', 12, '%'],
    ['-1.5 kg', -1.5, 'kg'],
    ['1,234.5 lbs', 1234.5, 'lb'],
    ['7 m2', 7, 'm²'],
    ['3\u00a0t', 3, 't'],
    ['2 nautical  miles', 2, 'nmi'],
  ])('%j is a number with its unit', (text, value, unit) => {
    units.read(text);
    expect([numbers.pointValue, units.unit?.symbol]).toEqual([value, unit]);
  });

  it('has its decimal comma', () => {
    units.read('3,5 t');
    expect(numbers.commaValue).toBe(3.5);
  });

  it.each(['12 A', 'A12', '12 in stock', 'm', '12', 'frame 12 m', '12 m frame', '1-2 m', '007 m', 'm 12', '12 mm 3'])(
    '%j is not',
    (text) => {
      expect(units.read(text)).toBe(0);
      expect(units.unit).toBeNull();
    },
  );
});
