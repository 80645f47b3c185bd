import fc from 'fast-check';
import { shapeOf } from '../looking/comparison/column-shape';
import { bindCondition } from '../mending/formula-evaluation';
import { histogramOf } from './histogram';

const rangeOf = (values: readonly number[]): [number, number] => [
  values.reduce((least, value) => Math.min(least, value), Infinity),
  values.reduce((most, value) => Math.max(most, value), -Infinity),
];

/** Readings in tenths lie on edges often, and are what rounding puts into the wrong bin. */
const tenths = fc.integer({ min: -400, max: 400 }).map((count) => count / 10);
/** Neighbours among the large numbers leave no room for twenty different edges, and subnormal ones none for a width. */
const neighbours = fc.integer({ min: 0, max: 30 }).map((count) => 2 ** 53 + 2 * count);
const subnormal = fc.integer({ min: 0, max: 30 }).map((count) => count * Number.MIN_VALUE);
const any = fc.double({ noNaN: true, noDefaultInfinity: true });
const readings = fc
  .oneof(...[tenths, neighbours, subnormal, any].map((one) => fc.array(one, { minLength: 1, maxLength: 60 })))
  .map((values) => {
    const { edges } = histogramOf(Float64Array.from(values), ...rangeOf(values));
    return [...values, ...edges];
  });

/** How many rows the condition between two told edges finds, as a screen writes it. */
function rowsBetween(values: readonly number[], edges: readonly number[]): number[] {
  const table = {
    rowCount: values.length,
    columns: [{ name: 'length', kind: 'numeric' as const, values: Float64Array.from(values) }],
  };
  return edges.slice(1).map((to, bin) => {
    const sign = bin === edges.length - 2 ? '<=' : '<';
    const holds = bindCondition(`length >= ${String(edges[bin])} and length ${sign} ${String(to)}`, table);
    return values.filter((_, row) => holds(row)).length;
  });
}

describe('a histogram', () => {
  it('counts in every bin the rows that its edges, written as a condition, find', () => {
    fc.assert(
      fc.property(readings, (values) => {
        const { edges, counts } = histogramOf(Float64Array.from(values), ...rangeOf(values));
        expect(counts).toEqual(rowsBetween(values, edges));
        expect(counts.reduce((total, count) => total + count, 0)).toBe(values.length);
      }),
      { numRuns: 1000 },
    );
  });

  it('counts both sides of a comparison by the same told edges', () => {
    fc.assert(
      fc.property(readings, readings, (from, to) => {
        const side = (values: readonly number[]) =>
          ({ name: 'length', kind: 'numeric', values: Float64Array.from(values) }) as const;
        const shape = shapeOf(side(from), side(to));
        expect(shape?.from).toEqual(rowsBetween(from, shape?.edges ?? []));
        expect(shape?.to).toEqual(rowsBetween(to, shape?.edges ?? []));
      }),
      { numRuns: 500 },
    );
  });

  it('has one bin for a column of one value, and twenty otherwise', () => {
    expect(histogramOf(Float64Array.of(3, 3, NaN), 3, 3)).toEqual({ edges: [3, 3], counts: [2] });
    expect(histogramOf(Float64Array.of(-10, NaN, 10), -10, 10).counts).toEqual([
      1,
      ...new Array<number>(18).fill(0),
      1,
    ]);
  });
});
