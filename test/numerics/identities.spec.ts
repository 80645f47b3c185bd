import { fitRecords } from '../../service/src/regression/fit';
import { logEvidence } from '../../service/src/regression/inference/evidence';
import { hatFeatures, penalisedInverse } from '../../service/src/regression/inference/hat-features';
import { studentQuantile } from '../../service/src/regression/inference/student-t';
import { seededRandom } from '../../service/src/regression/random';
import type { FitResult } from '../../service/src/regression/result';
import { ridgeFromMoments } from '../../service/src/regression/solvers/ridge-moments';
import type { FitSpecification } from '../../service/src/regression/specification';
import { normalNumbers } from './invented-yard';
import { numeric, readFixture, relativeDifference, table } from './reference';

/** Orthonormal ±1 columns with mean 0 (a Hadamard matrix of order 8): already standardised. */
const HADAMARD = [
  [1, -1, 1, -1, 1, -1, 1, -1],
  [1, 1, -1, -1, 1, 1, -1, -1],
  [1, -1, -1, 1, 1, -1, -1, 1],
];
const TARGET = [3, -1, 2, 5, 0, 4, -2, 7];

async function fitHadamard(change: Partial<FitSpecification>): Promise<FitResult> {
  const { result } = await fitRecords(
    table([...HADAMARD.map((column, at) => numeric(`x${at}`, column)), numeric('y', TARGET)]),
    {
      target: { column: 'y', transform: 'none' },
      inputs: HADAMARD.map((_, at) => ({ column: `x${at}` })),
      method: 'least-squares',
      validation: { scheme: 'k-fold', folds: 2 },
      ...change,
    },
  );
  return result;
}

const leastSquares = HADAMARD.map((column) => column.reduce((sum, value, row) => sum + value * TARGET[row], 0) / 8);
const soft = (value: number, threshold: number): number => Math.sign(value) * Math.max(0, Math.abs(value) - threshold);

describe('an orthonormal design (Hastie, Tibshirani and Friedman 2009, table 3.4)', () => {
  const standardised = (result: FitResult): number[] => result.weights.map((weight) => weight.standardised);

  it('has least squares weights c', async () => {
    expect(relativeDifference(standardised(await fitHadamard({})), leastSquares)).toBeLessThan(1e-14);
  });
  it('has ridge weights c/(1 + λ)', async () => {
    const result = await fitHadamard({ method: 'ridge', penalty: { rule: 'fixed', value: 0.7 } });
    expect(
      relativeDifference(
        standardised(result),
        leastSquares.map((value) => value / 1.7),
      ),
    ).toBeLessThan(1e-14);
    expect(result.penalty.effectiveDegreesOfFreedom).toBeCloseTo(3 / 1.7, 12);
  });
  it('has lasso weights by soft thresholding', async () => {
    const result = await fitHadamard({ method: 'lasso', penalty: { rule: 'fixed', value: 0.6 } });
    expect(
      relativeDifference(
        standardised(result),
        leastSquares.map((value) => soft(value, 0.6)),
      ),
    ).toBeLessThan(1e-14);
  });
  it('has elastic net weights soft(c, λα)/(1 + λ(1 − α))', async () => {
    const result = await fitHadamard({ method: 'elastic-net', mixing: 0.25, penalty: { rule: 'fixed', value: 0.8 } });
    expect(
      relativeDifference(
        standardised(result),
        leastSquares.map((value) => soft(value, 0.2) / 1.6),
      ),
    ).toBeLessThan(1e-14);
  });
  it('multiplies λ by the penalty factor, leaves a factor of 0 free, and keeps sign limits', async () => {
    const inputs = [
      { column: 'x0', penaltyFactor: 3 },
      { column: 'x1', penaltyFactor: 0 },
      { column: 'x2', sign: leastSquares[2] > 0 ? ('not-positive' as const) : ('not-negative' as const) },
    ];
    const result = await fitHadamard({ method: 'ridge', inputs, penalty: { rule: 'fixed', value: 0.5 } });
    expect(relativeDifference(standardised(result), [leastSquares[0] / 2.5, leastSquares[1], 0])).toBeLessThan(1e-9);
  });
});

interface LeaveOneOutReference {
  readonly rows: readonly (readonly number[])[];
  readonly leaveOneOut: readonly {
    readonly lambdaSum: number;
    readonly meanSquare: number;
    readonly generalised: number;
  }[];
}

describe('leave-one-out', () => {
  const { rows, leaveOneOut } = readFixture<LeaveOneOutReference>('hald-ridge.json');

  it('is minimised by the rule leave-one-out at the penalty that explicit refits prefer', async () => {
    const columns = [0, 1, 2, 3].map((at) =>
      numeric(
        `x${at}`,
        rows.map((row) => row[at]),
      ),
    );
    const { result } = await fitRecords(
      table([
        ...columns,
        numeric(
          'y',
          rows.map((row) => row[4]),
        ),
      ]),
      {
        target: { column: 'y', transform: 'none' },
        inputs: columns.map((column) => ({ column: column.name })),
        method: 'ridge',
        penalty: { rule: 'leave-one-out' },
        validation: { scheme: 'k-fold', folds: 3 },
      },
    );
    const errors = result.path.map((point) => bruteForceError(rows, point.lambda * rows.length));
    const best = errors.indexOf(Math.min(...errors));
    expect(result.penalty.lambda).toBe(result.path[best].lambda);
  });

  it('agrees between the brute force of this test and the stored reference', () => {
    leaveOneOut.forEach((entry) => expect(bruteForceError(rows, entry.lambdaSum)).toBeCloseTo(entry.meanSquare, 8));
  });
});

/** Leaves each record out of a ridge on columns standardised by all records, sum-form penalty kept, intercept estimated anew. */
function bruteForceError(rows: readonly (readonly number[])[], lambdaSum: number): number {
  const inputs = [0, 1, 2, 3].map((at) => standardised(rows.map((row) => row[at])));
  const errors = rows.map((row, out) => {
    const kept = rows.map((_, at) => at).filter((at) => at !== out);
    const mean = (values: readonly number[]): number => kept.reduce((sum, at) => sum + values[at], 0) / kept.length;
    const means = inputs.map(mean);
    const target = rows.map((entry) => entry[4]);
    const targetMean = mean(target);
    const matrix = inputs.map((first, i) =>
      inputs.map((second, j) =>
        kept.reduce((sum, at) => sum + (first[at] - means[i]) * (second[at] - means[j]), i === j ? lambdaSum : 0),
      ),
    );
    const right = inputs.map((first, i) =>
      kept.reduce((sum, at) => sum + (first[at] - means[i]) * (target[at] - targetMean), 0),
    );
    const weights = solveByElimination(matrix, right);
    return row[4] - targetMean - weights.reduce((sum, weight, i) => sum + weight * (inputs[i][out] - means[i]), 0);
  });
  return errors.reduce((sum, error) => sum + error * error, 0) / rows.length;
}

function standardised(values: readonly number[]): number[] {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const scale = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length);
  return values.map((value) => (value - mean) / scale);
}

function solveByElimination(matrix: readonly (readonly number[])[], right: readonly number[]): number[] {
  const work = matrix.map((row, at) => [...row, right[at]]);
  work.forEach((pivotRow, k) => {
    for (let i = 0; i < work.length; i += 1) {
      if (i === k) continue;
      const factor = work[i][k] / pivotRow[k];
      for (let j = k; j <= work.length; j += 1) work[i][j] -= factor * pivotRow[j];
    }
  });
  return work.map((row, k) => row[work.length] / row[k]);
}

describe('the evidence', () => {
  // Prior b ~ N(0, 1) for both columns, noise variance 1/4, X = [1 0; 1 1; 1 2], y = (1, 2, 2), no intercept beside it:
  // log N(y; 0, XXᵀ + I/4) = −4.177047701975482 (Bishop 2006, eqs 3.49 to 3.59 and 3.86; recomputed with numpy).
  it('has the value of the multivariate normal density of the target', () => {
    const columns = [
      [1, 1, 1],
      [0, 1, 2],
    ];
    const target = [1, 2, 2];
    const dot = (first: readonly number[], second: readonly number[]): number =>
      first.reduce((sum, value, at) => sum + value * second[at], 0) / 3;
    const problem = {
      weightSum: 3,
      size: 2,
      kept: Int32Array.of(0, 1),
      gram: Float64Array.from(columns.flatMap((first) => columns.map((second) => dot(first, second)))),
      cross: Float64Array.from(columns.map((column) => dot(column, target))),
      targetSquare: dot(target, target),
      means: new Float64Array(2),
      scales: Float64Array.of(1, 1),
      targetMean: 0,
      fills: [],
    };
    const form = ridgeFromMoments(problem, { factors: Float64Array.of(1, 1), signs: ['any', 'any'] });
    expect(logEvidence(form, { records: 3, flat: 0 }, 0.25, 0.25 / 3)).toBeCloseTo(-4.177047701975482, 12);
    expect(Array.from(form.weights([0.25 / 3])[0])).toEqual([expect.closeTo(44 / 43, 13), expect.closeTo(24 / 43, 13)]);
  });

  it('goes with the exact posterior covariance σ²(XᵀX + nλI)⁻¹: [7/43, −4/43; −4/43, 13/129]', () => {
    const problem = {
      weightSum: 3,
      size: 2,
      kept: Int32Array.of(0, 1),
      gram: Float64Array.of(1, 1, 1, 5 / 3),
      cross: Float64Array.of(5 / 3, 2),
      targetSquare: 3,
      means: new Float64Array(2),
      scales: Float64Array.of(1, 1),
      targetMean: 0,
      fills: [],
    };
    const features = hatFeatures(problem, { factors: Float64Array.of(1, 1), signs: ['any', 'any'] });
    const covariance = penalisedInverse(features, 0.25 / 3).map((value) => (0.25 * value) / 3);
    const expected = [7 / 43, -4 / 43, -4 / 43, 13 / 129];
    expect(Array.from(covariance)).toEqual(expected.map((value) => expect.closeTo(value, 14)));
  });

  it('equals the numerical integral over one weight', () => {
    const x = [-1.2, -0.3, 0.1, 0.6, 0.8];
    const y = [-2.0, -0.9, 0.4, 0.7, 1.9];
    const [variance, prior] = [0.3, 2];
    const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);
    const problem = {
      weightSum: 5,
      size: 1,
      kept: Int32Array.of(0),
      gram: Float64Array.of(sum(x.map((value) => value * value)) / 5),
      cross: Float64Array.of(sum(x.map((value, at) => value * y[at])) / 5),
      targetSquare: sum(y.map((value) => value * value)) / 5,
      means: new Float64Array(1),
      scales: Float64Array.of(1),
      targetMean: 0,
      fills: [],
    };
    const form = ridgeFromMoments(problem, { factors: Float64Array.of(1), signs: ['any'] });
    const density = (weight: number): number => {
      const misfit = sum(x.map((value, at) => (y[at] - weight * value) ** 2));
      return (
        Math.exp(-misfit / (2 * variance) - weight ** 2 / (2 * prior)) /
        ((2 * Math.PI * variance) ** 2.5 * Math.sqrt(2 * Math.PI * prior))
      );
    };
    const step = 1e-3;
    const integral = sum(Array.from({ length: 24001 }, (_, at) => density(-12 + at * step))) * step;
    expect(logEvidence(form, { records: 5, flat: 0 }, variance, variance / (5 * prior))).toBeCloseTo(
      Math.log(integral),
      10,
    );
  });

  it('is highest at the penalty that the rule evidence reports, and gives its variances', async () => {
    const random = seededRandom(11);
    const normal = normalNumbers(random);
    const columns = [0, 1, 2, 3, 4].map((at) => numeric(`x${at}`, Array.from({ length: 60 }, normal)));
    const target = Array.from({ length: 60 }, (_, row) =>
      columns.reduce(
        (sum, column, at) => sum + (column.kind === 'numeric' ? column.values[row] : 0) * (at - 2) * 0.4,
        normal(),
      ),
    );
    const { result } = await fitRecords(table([...columns, numeric('y', target)]), {
      target: { column: 'y', transform: 'none' },
      inputs: columns.map((column) => ({ column: column.name })),
      method: 'ridge',
      penalty: { rule: 'evidence' },
    });
    const { evidence } = result.diagnostics;
    expect(evidence).not.toBeNull();
    expect(result.penalty.lambda).toBeCloseTo(
      (evidence?.residualVariance ?? NaN) / (60 * (evidence?.priorVariance ?? NaN)),
      10,
    );
    expect(result.penalty.priorSd).toBeCloseTo(Math.sqrt(evidence?.priorVariance ?? NaN), 10);
    // Both conditions for the maximum (MacKay 1992; Bishop 2006, eqs 3.92 and 3.95), with the intercept integrated out.
    const degrees = result.penalty.effectiveDegreesOfFreedom;
    const lengthSquared = result.weights.reduce((sum, weight) => sum + weight.standardised ** 2, 0);
    const residualSquares = 60 * result.accuracy.trainingRmse ** 2;
    expect(lengthSquared / degrees / (evidence?.priorVariance ?? NaN)).toBeCloseTo(1, 10);
    expect(residualSquares / (60 - 1 - degrees) / (evidence?.residualVariance ?? NaN)).toBeCloseTo(1, 10);
  });
});

describe('quantiles of Student’s t (R 4.2.2, qt)', () => {
  it.each([
    [0.9, 1, 6.313751514675037],
    [0.95, 5, 2.570581835636314],
    [0.9, 30, 1.6972608865939587],
    [0.99, 437, 2.587126393212904],
    [0.95, 1e6, 1.959966356814107],
  ])('two-sided %d with %d degrees', (level, degrees, expected) => {
    expect(studentQuantile(level, degrees)).toBeCloseTo(expected, 7);
  });
});
