import { fitRecords } from '../../service/src/regression/fit';
import type { FitResult } from '../../service/src/regression/result';
import type { FitSpecification } from '../../service/src/regression/specification';
import { seededRandom } from '../../service/src/regression/random';
import { inventedRefits, normalNumbers } from './invented-yard';
import { numeric, table } from './reference';

const normal = normalNumbers(seededRandom(17));
const draw = (): number[] => Array.from({ length: 120 }, normal);
const add = (...columns: readonly (readonly number[])[]): number[] =>
  columns[0].map((_, row) => columns.reduce((sum, column) => sum + column[row], 0));
const times = (column: readonly number[], factor: number): number[] => column.map((value) => value * factor);

const length = draw();
const waterline = add(length, times(draw(), 0.1));
const alone = draw();
const first = draw();
const second = draw();
const total = add(first, second, times(draw(), 0.01));
const target = add(length, waterline, alone, times(first, 0.5), draw());
const names = ['length', 'waterline', 'alone', 'first', 'second', 'total'];
const columns = [length, waterline, alone, first, second, total].map((values, at) => numeric(names[at], values));

async function fit(change: Partial<FitSpecification>, rows: (row: number) => boolean = () => true): Promise<FitResult> {
  const kept = target.map((_, row) => row).filter(rows);
  const pick = (values: ArrayLike<number>): number[] => kept.map((row) => values[row]);
  const used = columns.map((column) => numeric(column.name, pick(column.kind === 'numeric' ? column.values : [])));
  const { result } = await fitRecords(table([...used, numeric('y', pick(target))]), {
    target: { column: 'y', transform: 'none' },
    inputs: names.map((column) => ({ column })),
    method: 'ridge',
    penalty: { rule: 'minimum' },
    ...change,
  });
  return result;
}

describe('shared load', () => {
  let result: FitResult;
  beforeAll(async () => {
    result = await fit({});
  });

  it('groups two inputs that nearly repeat each other', () => {
    const group = result.diagnostics.sharedLoad.find((candidate) => candidate.found === 'correlation');
    expect(group?.members.map((member) => member.input)).toEqual(['length', 'waterline']);
    expect(group?.smallestCorrelation).toBeGreaterThan(0.95);
  });

  it('finds a sum of two inputs as a near-null direction, although no pair is close', () => {
    const group = result.diagnostics.sharedLoad.find((candidate) => candidate.found === 'near-null direction');
    expect(group?.members.map((member) => member.input)).toEqual(['first', 'second', 'total']);
  });

  it('shows that ridge splits a load more evenly than least squares', () => {
    const group = result.diagnostics.sharedLoad.find((candidate) => candidate.found === 'correlation');
    const unevenness = (weights: readonly number[] | null | undefined): number =>
      Math.abs((weights?.[0] ?? NaN) - (weights?.[1] ?? NaN));
    expect(unevenness(group?.ridge)).toBeLessThan(unevenness(group?.leastSquares));
  });

  it('has no group among inputs that are unrelated', async () => {
    const { diagnostics } = await fit({ inputs: [{ column: 'length' }, { column: 'alone' }, { column: 'first' }] });
    expect(diagnostics.sharedLoad).toEqual([]);
  });
});

describe('influence', () => {
  it('gives Cook’s distance as refitting without the record does', async () => {
    const whole = await fit({ method: 'least-squares' });
    const [most] = whole.diagnostics.influential;
    const without = await fit({ method: 'least-squares' }, (row) => row !== most.row);
    const fittedBy = (result: FitResult, row: number): number =>
      result.weights.reduce(
        (sum, weight, at) => sum + weight.value * ([length, waterline, alone, first, second, total][at][row] ?? NaN),
        result.intercept,
      );
    const moved = target.reduce((sum, _, row) => sum + (fittedBy(whole, row) - fittedBy(without, row)) ** 2, 0);
    expect(most.cooksDistance).toBeCloseTo(moved / (7 * whole.diagnostics.residualSd ** 2), 8);
  });

  it('names the record that was spoilt', async () => {
    const spoilt = table([
      ...columns,
      numeric(
        'y',
        target.map((value, row) => (row === 33 ? value + 40 : value)),
      ),
    ]);
    const { result } = await fitRecords(spoilt, {
      target: { column: 'y', transform: 'none' },
      inputs: names.map((column) => ({ column })),
      method: 'ridge',
      penalty: { rule: 'minimum' },
    });
    expect(result.diagnostics.influential[0].row).toBe(33);
  });

  it('has leverages that add up to the degrees of freedom with the intercept', async () => {
    const result = await fit({});
    const sum = result.diagnostics.residuals.reduce((total_, point) => total_ + (point.leverage ?? NaN), 0);
    expect(sum).toBeCloseTo(result.penalty.effectiveDegreesOfFreedom + 1, 9);
  });
});

describe('what is worked out on request', () => {
  it('counts how often lasso chooses each input in half samples: always a strong one, seldom an idle one', async () => {
    const { diagnostics } = await fit({
      method: 'lasso',
      penalty: { rule: 'one-standard-error' },
      extras: { selectionSamples: 40 },
    });
    const frequency = new Map(diagnostics.selectionFrequency?.map((row) => [row.input, row.frequency]));
    expect(frequency.get('alone')).toBe(1);
    expect(frequency.get('second') ?? NaN).toBeLessThan(0.7);
  });

  it('has no standard errors for lasso, and no selection frequencies for ridge', async () => {
    const lasso = await fit({ method: 'lasso' });
    expect(lasso.weights.every((weight) => weight.standardError === undefined)).toBe(true);
    expect((await fit({})).diagnostics.selectionFrequency).toBeNull();
  });

  it('draws a learning curve that falls toward the noise', async () => {
    const { diagnostics } = await fit({ extras: { learningCurve: true } });
    const curve = diagnostics.learningCurve ?? [];
    expect(curve.length).toBeGreaterThan(4);
    expect(curve[curve.length - 1].rmse).toBeLessThan(curve[0].rmse);
    expect(curve[curve.length - 1].rmse).toBeGreaterThan(0.8);
  });

  it('gives a nested error no smaller than a whisker below the error at the chosen penalty', async () => {
    const { accuracy } = await fit({ extras: { nestedFolds: true } });
    expect(accuracy.nestedRmse).toBeGreaterThan(accuracy.rmse * 0.999);
    expect(accuracy.nestedRmse).toBeLessThan(accuracy.rmse * 1.1);
  });
});

describe('accuracy of a logged target', () => {
  it('smears by the mean of the exponentiated residuals, so that estimates are right on average', async () => {
    const records = inventedRefits(500, 3);
    const { result, formula } = await fitRecords(records, {
      target: { column: 'labour', transform: 'log' },
      inputs: [{ column: 'length', transform: 'log' }, { column: 'hull' }],
      method: 'ridge',
      penalty: { rule: 'minimum' },
    });
    const points = result.diagnostics.residuals;
    const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
    expect(formula.target.smearing).toBeCloseTo(mean(points.map((point) => Math.exp(point.residual))), 10);
    expect(
      mean(points.map((point) => point.heldOutEstimate ?? NaN)) / mean(points.map((point) => point.recorded)),
    ).toBeCloseTo(1, 2);
  });

  it('covers as it states, overall and as a share of each quarter', async () => {
    const { accuracy } = (
      await fitRecords(inventedRefits(500, 3), {
        target: { column: 'labour', transform: 'log' },
        inputs: [{ column: 'length' }, { column: 'hull' }],
        method: 'ridge',
        penalty: { rule: 'minimum' },
      })
    ).result;
    expect(accuracy.coverage).toBeGreaterThan(0.86);
    expect(accuracy.coverage).toBeLessThan(0.94);
    expect(accuracy.coverageByQuarter).toHaveLength(4);
    expect(
      accuracy.coverageByQuarter.reduce((sum, quarter) => sum + quarter.records * quarter.coverage, 0) / 500,
    ).toBeCloseTo(accuracy.coverage, 10);
  });
});
