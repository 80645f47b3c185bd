import { ReadingSorter } from './reading-sorter';

const own = (values: readonly number[]): number[] => [
  ...Float64Array.from(values)
    .filter((v) => v === v)
    .sort(),
];

describe('the sorting of readings', () => {
  const sorter = new ReadingSorter(5000);
  const cases: Readonly<Record<string, readonly number[]>> = {
    'none at all': [],
    'nothing but missing ones': [NaN, NaN],
    one: [3],
    'numbers of every size and sign': [
      0,
      -0,
      1,
      -1,
      5e-324,
      -5e-324,
      1.7e308,
      -1.7e308,
      0.1,
      NaN,
      0.30000000000000004,
      0.3,
    ],
    'infinite ones': [Infinity, 2, -Infinity],
    'few different numbers': Array.from({ length: 3000 }, (_, row) => row % 3),
    'decimals of both signs': Array.from({ length: 5000 }, (_, row) => Math.round(Math.sin(row) * 1e5) / 100),
    'numbers whose bits are all in use': Array.from(
      { length: 5000 },
      (_, row) => Math.tan(row) * 10 ** ((row % 41) - 20),
    ),
  };

  it.each(Object.entries(cases))('puts %s in ascending order, bit for bit', (_, values) => {
    const found = [...sorter.sort(Float64Array.from(values))];
    const expected = own(values);
    expect(found).toHaveLength(expected.length);
    expect(found.every((value, at) => Object.is(value, expected[at]))).toBe(true);
  });

  it('leaves the readings themselves as they were', () => {
    const values = Float64Array.of(3, NaN, -2);
    sorter.sort(values);
    expect([...values]).toEqual([3, NaN, -2]);
  });
});
