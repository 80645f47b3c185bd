import { fitRecords } from '../../service/src/regression/fit';
import { cvPlusInterval, thinResiduals } from '../../service/src/regression/formula/cv-plus-interval';
import { evaluateFormula } from '../../service/src/regression/formula/evaluate';
import type { FitSpecification } from '../../service/src/regression/specification';
import { numeric, readFixture, table } from './reference';

const cars = readFixture<{
  readonly source: string;
  readonly rows: readonly (readonly number[])[];
  readonly cvPlus: {
    readonly level: number;
    readonly at: readonly number[];
    readonly lower: readonly number[];
    readonly upper: readonly number[];
  };
  readonly jackknifePlus: { readonly lower: readonly number[]; readonly upper: readonly number[] };
  readonly prediction90: { readonly at: readonly number[]; readonly intervals: readonly (readonly number[])[] };
  readonly prediction95: { readonly at: readonly number[]; readonly intervals: readonly (readonly number[])[] };
}>('cars-intervals.json');

const records = table([
  numeric(
    'speed',
    cars.rows.map((row) => row[0]),
  ),
  numeric(
    'distance',
    cars.rows.map((row) => row[1]),
  ),
  numeric(
    'fold',
    cars.rows.map((_, row) => row % 5),
  ),
  numeric(
    'row',
    cars.rows.map((_, row) => row),
  ),
]);

const specification: FitSpecification = {
  target: { column: 'distance', transform: 'none' },
  inputs: [{ column: 'speed' }],
  method: 'least-squares',
  validation: { scheme: 'grouped', folds: 5, column: 'fold' },
};

describe(`intervals on the cars data (${cars.source.slice(0, 31)})`, () => {
  it('gives the CV+ interval with the stated folds', async () => {
    const { formula } = await fitRecords(records, specification);
    cars.cvPlus.at.forEach((speed, at) => {
      const { interval } = evaluateFormula(formula, { speed });
      expect(interval.low).toBeCloseTo(cars.cvPlus.lower[at], 8);
      expect(interval.high).toBeCloseTo(cars.cvPlus.upper[at], 8);
    });
  });

  it('gives the jackknife+ when every record is a fold', async () => {
    const { formula } = await fitRecords(records, {
      ...specification,
      validation: { scheme: 'grouped', folds: 50, column: 'row' },
    });
    cars.cvPlus.at.forEach((speed, at) => {
      const { interval } = evaluateFormula(formula, { speed });
      expect(interval.low).toBeCloseTo(cars.jackknifePlus.lower[at], 8);
      expect(interval.high).toBeCloseTo(cars.jackknifePlus.upper[at], 8);
    });
  });

  it.each([
    [0.9, cars.prediction90],
    [0.95, cars.prediction95],
  ])('gives the Gaussian prediction interval of least squares at level %d', async (intervalLevel, expected) => {
    const { formula } = await fitRecords(records, { ...specification, intervalLevel });
    expected.at.forEach((speed, at) => {
      const { gaussianInterval, value } = evaluateFormula(formula, { speed });
      expect(value).toBeCloseTo(expected.intervals[at][0], 9);
      expect(gaussianInterval?.low).toBeCloseTo(expected.intervals[at][1], 6);
      expect(gaussianInterval?.high).toBeCloseTo(expected.intervals[at][2], 6);
    });
  });
});

describe('the order statistics of CV+', () => {
  // Level 0.9 and nine records: the index is exactly 9, which floating point makes 9.000000000000002 or 1 − 0.9 makes 0.
  it('takes the ninth of nine at level 0.9, not an infinite one', () => {
    const residuals = [1, 2, 3, 4, 5, 6, 7, 8, 9];
    expect(cvPlusInterval([{ residuals, counts: residuals.map(() => 1) }], [100], 0.9)).toEqual({ low: 91, high: 109 });
  });

  it('never narrows an interval by thinning the residuals', () => {
    const residuals = Float64Array.from({ length: 20000 }, (_, at) => Math.sqrt(at + 1));
    const whole = cvPlusInterval(
      [{ residuals: Array.from(residuals), counts: Array.from(residuals, () => 1) }],
      [0],
      0.9,
    );
    const thin = thinResiduals(residuals, 300);
    const thinned = cvPlusInterval([thin], [0], 0.9);
    expect(thin.residuals.length).toBeLessThanOrEqual(300);
    expect(thin.counts.reduce((sum, count) => sum + count, 0)).toBe(20000);
    expect(thinned.high).toBeGreaterThanOrEqual(whole.high);
    expect(thinned.high).toBeLessThan(whole.high * 1.01);
  });
});
