import { placeKnots, quantile, splineColumns } from './spline';

const KNOTS = [1, 2, 4, 7];

describe('the natural cubic spline', () => {
  it('is linear below the first and above the last knot', () => {
    const bend = (reading: number): number[] => splineColumns(reading, KNOTS).slice(1);
    expect(bend(0.2)).toEqual([0, 0]);
    [0, 1].forEach((column) =>
      expect(bend(10)[column] - bend(9)[column]).toBeCloseTo(bend(20)[column] - bend(19)[column], 10),
    );
  });

  it('has continuous second derivatives at its knots', () => {
    const second = (reading: number, column: number): number => {
      const step = 1e-3;
      return (
        (splineColumns(reading + step, KNOTS)[column] -
          2 * splineColumns(reading, KNOTS)[column] +
          splineColumns(reading - step, KNOTS)[column]) /
        step ** 2
      );
    };
    for (const knot of KNOTS)
      for (const column of [1, 2]) expect(second(knot - 2e-3, column)).toBeCloseTo(second(knot + 2e-3, column), 1);
  });
});

describe('knots', () => {
  it('stand at quantiles of the readings that are present', () => {
    const readings = Float64Array.from({ length: 101 }, (_, at) => (at === 50 ? NaN : at));
    expect(placeKnots(readings, 3)[0]).toBeCloseTo(9.9, 10);
  });

  it('are merged where readings repeat, and none are placed when fewer than three are left', () => {
    expect(placeKnots(Float64Array.from([1, 1, 1, 1, 1, 1, 1, 2]), 5)).toEqual([]);
    expect(placeKnots(Float64Array.from([1, 1, 1, 1, 2, 2, 2, 2]), 5)).toEqual([1, 1.5, 2]);
  });
});

describe('a quantile', () => {
  // R 4.2.2: quantile(c(1, 2, 4, 8), 0.4, type = 7) is 2.4.
  it('is interpolated as type 7 has it', () => {
    expect(quantile(Float64Array.of(1, 2, 4, 8), 0.4)).toBeCloseTo(2.4, 12);
  });
});
