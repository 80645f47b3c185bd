import { Matrix, solve } from 'ml-matrix';
import type { StandardisedRows } from '../../service/src/regression/design/standardised-rows';
import { fitRecords } from '../../service/src/regression/fit';
import { leaveOneOutErrorsWide } from '../../service/src/regression/inference/leave-one-out-wide';
import { seededRandom } from '../../service/src/regression/random';

// The identity is exact for records left out of a fit with the same standardised columns, the same sum-form penalty and an
// intercept estimated anew (Golub, Heath and Wahba 1979, Technometrics 21, 215-223); the refits below use ml-matrix alone.
const [records, inputs] = [10, 14];
const random = seededRandom(3);
const raw = Array.from({ length: inputs }, () => Array.from({ length: records }, () => random() * 4));
const target = Array.from({ length: records }, (_, row) => 3 * raw[0][row] - raw[1][row] + random());
const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
const columns = raw.map((values) => {
  const centre = mean(values);
  const scale = Math.sqrt(mean(values.map((value) => (value - centre) ** 2)));
  return values.map((value) => (value - centre) / scale);
});

function refitError(lambda: number): number {
  const errors = target.map((value, out) => {
    const kept = target.map((_, row) => row).filter((row) => row !== out);
    const means = columns.map((column) => mean(kept.map((row) => column[row])));
    const targetMean = mean(kept.map((row) => target[row]));
    const x = new Matrix(kept.map((row) => columns.map((column, at) => column[row] - means[at])));
    const y = Matrix.columnVector(kept.map((row) => target[row] - targetMean));
    const held = x
      .transpose()
      .mmul(x)
      .add(Matrix.eye(inputs).mul(records * lambda));
    const weights = solve(held, x.transpose().mmul(y));
    const fitted = columns.reduce(
      (sum, column, at) => sum + (column[out] - means[at]) * weights.get(at, 0),
      targetMean,
    );
    return (value - fitted) ** 2;
  });
  return mean(errors);
}

describe('leave-one-out with more inputs than records', () => {
  it('is the error of explicit refits at every penalty', () => {
    const targetMean = mean(target);
    const source = {
      rowCount: records,
      x: Float64Array.from(columns.flat()),
      y: Float64Array.from(target, (value) => value - targetMean),
      rootWeights: new Float64Array(records).fill(1),
      problem: { weightSum: records, size: inputs },
    } as unknown as StandardisedRows;
    const penalties = {
      factors: new Float64Array(inputs).fill(1),
      signs: columns.map(() => 'any' as const),
    } as unknown as Parameters<typeof leaveOneOutErrorsWide>[1];
    const lambdas = [10, 1, 0.1, 0.01];
    leaveOneOutErrorsWide(source, penalties, true, lambdas).forEach((error, at) => {
      expect(Math.abs(error / refitError(lambdas[at]) - 1)).toBeLessThan(1e-9);
    });
  });

  it('chooses the penalty that explicit refits prefer', async () => {
    const numeric = (name: string, values: readonly number[]) =>
      ({ name, kind: 'numeric', values: Float64Array.from(values) }) as const;
    const named = raw.map((values, at) => numeric(`x${at}`, values));
    const { result } = await fitRecords(
      { rowCount: records, columns: [...named, numeric('y', target)] },
      {
        target: { column: 'y', transform: 'none' },
        inputs: named.map(({ name }) => ({ column: name })),
        method: 'ridge',
        penalty: { rule: 'leave-one-out' },
        validation: { scheme: 'k-fold', folds: 5 },
      },
    );
    const errors = result.path.map((point) => refitError(point.lambda));
    expect(result.penalty.lambda).toBe(result.path[errors.indexOf(Math.min(...errors))].lambda);
  });
});
