import { NumberClass, NumberReader } from './number-cell';

const reader = new NumberReader();
const read = (text: string) => {
  const numberClass = reader.read(text);
  return numberClass === NumberClass.none ? 'none' : [numberClass, reader.pointValue, reader.commaValue];
};

/** Park-Miller, so that a failure can be repeated. */
function* randomNumbers(seed: number): Generator<number> {
  for (let state = seed; ;) yield (state = (state * 48271) % 2147483647) / 2147483647;
}

describe('reading a number', () => {
  it.each([
    ['12', [NumberClass.integer, 12, 12]],
    ['-0.5', [NumberClass.point, -0.5, NaN]],
    ['+.25', [NumberClass.point, 0.25, NaN]],
    ['7,5', [NumberClass.comma, NaN, 7.5]],
    ['1.234', [NumberClass.pointOrGroup, 1.234, 1234]],
    ['1,234', [NumberClass.commaOrGroup, 1234, 1.234]],
    ['0.125', [NumberClass.point, 0.125, NaN]],
    ['1234.567', [NumberClass.point, 1234.567, NaN]],
    ['1,234.5', [NumberClass.point, 1234.5, NaN]],
    ['1.234,5', [NumberClass.comma, NaN, 1234.5]],
    ['1,234,567', [NumberClass.point, 1234567, NaN]],
    ['1 234 567', [NumberClass.integer, 1234567, 1234567]],
    ['1\u202f234,5', [NumberClass.comma, NaN, 1234.5]],
    ["1'234.50", [NumberClass.point, 1234.5, NaN]],
    [' 12 ', [NumberClass.integer, 12, 12]],
    ['\u22123', [NumberClass.integer, -3, -3]],
    ['1e-3', [NumberClass.integer, 0.001, 0.001]],
    ['2.5E+10', [NumberClass.point, 2.5e10, NaN]],
    ['0.1234567890123456789', [NumberClass.point, 0.1234567890123456789, NaN]],
  ])('takes %j', (text, expected) => {
    expect(read(text)).toEqual(expected);
  });

  it.each(['', '-', '.', 'abc', '1.2.3', '12m', '00123', '1,23,4', '1e999', 'Infinity', '0x10', '1 23', '12-3', '٣'])(
    'does not take %j',
    (text) => {
      expect(read(text)).toBe('none');
    },
  );

  it('reads what JavaScript writes back to the same bits', () => {
    const random = randomNumbers(7);
    for (let round = 0; round < 20_000; round++) {
      const scale = 10 ** Math.floor(random.next().value * 24 - 12);
      const value = (random.next().value - 0.5) * scale;
      const text = round % 2 === 0 ? String(value) : value.toFixed(round % 9);
      const numberClass = reader.read(text);
      expect([text, numberClass === NumberClass.none]).toEqual([text, false]);
      expect([text, reader.pointValue]).toEqual([text, Number(text)]);
    }
  });
});
