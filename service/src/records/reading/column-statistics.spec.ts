import { histogramOf, statisticsOf } from './column-statistics';
import { DistinctCounter } from './distinct-counter';

const distinct = (values: Float64Array, limit = 1000) => new DistinctCounter(values.length, limit).count(values);

describe('a column’s figures', () => {
  it('have the divisor n and pass over missing readings', () => {
    // 2, 4, 4, 4, 5, 5, 7, 9 has mean 5 and standard deviation 2 exactly (worked by hand).
    const values = Float64Array.of(2, 4, NaN, 4, 4, 5, 5, 7, 9, NaN);
    expect(statisticsOf(values, new DistinctCounter(10, 1000))).toMatchObject({
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
    expect(statisticsOf(values, new DistinctCounter(1000, 1000))).toMatchObject({
      mean: 1e9 + 0.5,
      standardDeviation: 0.5,
    });
  });

  it('give one bin to a column of one value', () => {
    expect(histogramOf(Float64Array.of(3, 3, NaN), 3, 3)).toEqual({ edges: [3, 3], counts: [2] });
  });

  it('count every reading in exactly one of twenty bins', () => {
    const values = Float64Array.from({ length: 5000 }, (_, row) => Math.sin(row) * 10);
    const { edges, counts } = histogramOf(values, -10, 10);
    expect(edges).toHaveLength(21);
    expect(counts.reduce((total, count) => total + count, 0)).toBe(5000);
  });

  it('count different numbers as a set does', () => {
    for (let size = 1; size < 3000; size = size * 2 + 1) {
      const values = Float64Array.from({ length: size }, (_, row) =>
        row % 5 === 0 ? NaN : Math.round(Math.sin(row * size) * 40) / 8,
      );
      const expected = new Set([...values].filter((value) => !Number.isNaN(value)).map((value) => value + 0)).size;
      expect(distinct(values)).toBe(expected);
    }
  });

  it('give no distinct count above the limit', () => {
    const values = Float64Array.from({ length: 50 }, (_, row) => row);
    expect(distinct(values, 49)).toBeNull();
    expect(distinct(values, 50)).toBe(50);
  });
});
