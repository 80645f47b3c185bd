import { statisticsOf } from './column-statistics';
import { ReadingSorter } from './reading-sorter';
import { distinctOf, outlyingOf, quantilesOf } from './sorted-figures';

const sorted = (values: readonly number[]): Float64Array => Float64Array.from(values).sort();
const figures = (values: Float64Array, kind: 'numeric' | 'date' = 'numeric') =>
  statisticsOf(kind, values, new ReadingSorter(values.length));

/** datasets::precip of R: yearly rain of 70 cities, in inches. */
const precip = [
  67, 54.7, 7, 48.5, 14, 17.2, 20.7, 13, 43.4, 40.2, 38.9, 54.5, 59.8, 48.3, 22.9, 11.5, 34.4, 35.1, 38.7, 30.8, 30.6,
  43.1, 56.8, 40.8, 41.8, 42.5, 31, 31.7, 30.2, 25.9, 49.2, 37, 35.9, 15, 30.2, 7.2, 36.2, 45.5, 7.8, 33.4, 36.1, 40.2,
  42.7, 42.5, 16.2, 39, 35, 37, 31.4, 37.6, 39.9, 36.2, 42.8, 46.4, 24.7, 49.1, 46, 35.9, 7.8, 48.2, 15.2, 32.5, 44.7,
  42.6, 38.8, 17.4, 40.8, 29.1, 14.6, 59.2,
];
/** datasets::rivers of R: lengths of 141 rivers, in miles. */
const rivers = [
  735, 320, 325, 392, 524, 450, 1459, 135, 465, 600, 330, 336, 280, 315, 870, 906, 202, 329, 290, 1000, 600, 505, 1450,
  840, 1243, 890, 350, 407, 286, 280, 525, 720, 390, 250, 327, 230, 265, 850, 210, 630, 260, 230, 360, 730, 600, 306,
  390, 420, 291, 710, 340, 217, 281, 352, 259, 250, 470, 680, 570, 350, 300, 560, 900, 625, 332, 2348, 1171, 3710, 2315,
  2533, 780, 280, 410, 460, 260, 255, 431, 350, 760, 618, 338, 981, 1306, 500, 696, 605, 250, 411, 1054, 735, 233, 435,
  490, 310, 460, 383, 375, 1270, 545, 445, 1885, 380, 300, 380, 377, 425, 276, 210, 800, 420, 350, 360, 538, 1100, 1205,
  314, 237, 610, 360, 540, 1038, 424, 310, 300, 444, 301, 268, 620, 215, 652, 900, 525, 246, 360, 529, 500, 720, 270,
  430, 671, 1770,
];
/** datasets::islands of R: areas of 48 landmasses, in thousands of square miles; an even number of readings. */
const islands = [
  11506, 5500, 16988, 2968, 16, 184, 23, 280, 84, 73, 25, 43, 21, 82, 3745, 840, 13, 30, 30, 89, 40, 33, 49, 14, 42,
  227, 16, 36, 29, 15, 306, 44, 58, 43, 9390, 32, 13, 29, 6795, 16, 15, 183, 14, 26, 19, 13, 12, 82,
];

// R 4.2.2, stats::quantile(x, c(0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99), type = 7) and stats::mad(x); bounds are
// median(x) ± 5 mad(x), the count is the number of readings beyond them.
const fromR = [
  {
    name: 'precip',
    values: precip,
    quantiles: [7.138, 9.465, 29.375, 36.6, 42.775, 55.855, 62.032],
    outlying: { count: 0, low: -11.21385, high: 84.41385, deviation: 9.56277 },
  },
  {
    name: 'rivers',
    values: rivers,
    quantiles: [205.2, 230, 310, 425, 680, 1450, 2459],
    outlying: { count: 6, low: -649.885, high: 1499.885, deviation: 214.977 },
  },
  {
    name: 'islands',
    values: islands,
    quantiles: [12.47, 13, 20.5, 41, 183.25, 8481.75, 14411.46],
    outlying: { count: 10, low: -155.4445, high: 237.4445, deviation: 39.2889 },
  },
];

describe('a column’s figures', () => {
  it('have the divisor n and pass over missing readings', () => {
    // 2, 4, 4, 4, 5, 5, 7, 9 has mean 5 and standard deviation 2 exactly (worked by hand).
    expect(figures(Float64Array.of(2, 4, NaN, 4, 4, 5, 5, 7, 9, NaN))).toMatchObject({
      missingCount: 2,
      distinctCount: 5,
      minimum: 2,
      maximum: 9,
      mean: 5,
      standardDeviation: 2,
    });
  });

  it('stay accurate far from zero', () => {
    const values = Float64Array.from({ length: 1000 }, (_, row) => 1e9 + (row % 2));
    expect(figures(values)).toMatchObject({ mean: 1e9 + 0.5, standardDeviation: 0.5 });
  });

  it('are missing where every reading is', () => {
    expect(figures(Float64Array.of(NaN, NaN))).toMatchObject({
      ...{ missingCount: 2, distinctCount: 0, mean: null, quantiles: null, outlying: null, histogram: null },
    });
  });

  it('count different numbers as a set does, up to the limit', () => {
    for (let size = 1; size < 3000; size = size * 2 + 1) {
      const values = Array.from({ length: size }, (_, row) => Math.round(Math.sin(row * size) * 40) / 8);
      const expected = new Set(values.map((value) => value + 0)).size;
      expect(distinctOf(sorted(values), expected)).toBe(expected);
      expect(distinctOf(sorted(values), expected - 1)).toBeNull();
    }
  });
});

describe.each(fromR)('the quantiles and outlying readings of $name', ({ values, quantiles, outlying }) => {
  it('are those of R, whatever is missing between the readings', () => {
    const holed = Float64Array.from(values.flatMap((value) => [NaN, value]));
    const found = figures(holed);
    found.quantiles?.forEach(({ value }, index) => expect(value).toBeCloseTo(quantiles[index], 9));
    expect(found.quantiles?.map(({ share }) => share)).toEqual([0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99]);
    expect(found.outlying?.count).toBe(outlying.count);
    for (const bound of ['low', 'high', 'deviation'] as const)
      expect(found.outlying?.[bound]).toBeCloseTo(outlying[bound], 9);
  });
});

describe('outlying readings', () => {
  it('are not sought in a date column, whose quantiles are given all the same', () => {
    const found = figures(Float64Array.from(rivers), 'date');
    expect(found.outlying).toBeNull();
    expect(found.quantiles?.[3]).toEqual({ share: 0.5, value: 425 });
  });

  it('are not sought in fewer than twenty readings, nor where more than half of them are equal', () => {
    const ramp = Array.from({ length: 19 }, (_, row) => row);
    expect(outlyingOf(sorted(ramp))).toBeNull();
    expect(outlyingOf(sorted([...ramp, 1000]))?.count).toBe(1);
    expect(outlyingOf(sorted([...new Array<number>(25).fill(7), ...ramp]))).toBeNull();
  });

  it('are not sought where the bounds would overflow', () => {
    const huge = Array.from({ length: 30 }, (_, row) => (row % 2 === 0 ? 1.7e308 : -1.7e308));
    expect(outlyingOf(sorted(huge))).toBeNull();
    expect(quantilesOf(sorted(huge)).every(({ value }) => Math.abs(value) <= 1.7e308)).toBe(true);
  });
});
