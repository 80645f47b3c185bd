import { fitRecords } from '../../service/src/regression/fit';
import type { FitSpecification } from '../../service/src/regression/specification';
import { numeric, readFixture, relativeDifference, table } from './reference';

interface PathReference {
  readonly lambdas: readonly number[];
  readonly standardised: readonly (readonly number[])[];
  readonly degreesOfFreedom?: readonly number[];
  readonly cvError: readonly number[];
  readonly cvStandardError: readonly number[];
  readonly minimum: number;
  readonly oneStandardError: number;
}

interface CaseReference {
  readonly weights: readonly number[];
  readonly leastSquares: {
    readonly standardised: readonly number[];
    readonly values: readonly number[];
    readonly intercept: number;
  };
  readonly ridge: PathReference;
  readonly lasso: PathReference;
  readonly elasticNet: {
    readonly mixing: number;
    readonly lambdas: readonly number[];
    readonly standardised: readonly (readonly number[])[];
  };
}

interface Reference {
  readonly source: string;
  readonly names: readonly string[];
  readonly inputs: readonly (readonly number[])[];
  readonly target: readonly number[];
  readonly equal: CaseReference;
  readonly weighted: CaseReference;
}

const reference = readFixture<Reference>('diabetes-reference.json');

function records(weights: readonly number[]): ReturnType<typeof table> {
  return table([
    ...reference.names.map((name, at) => numeric(name, reference.inputs[at])),
    numeric('progression', reference.target),
    numeric('weight', weights),
    numeric(
      'fold',
      reference.target.map((_, row) => row % 10),
    ),
  ]);
}

function specification(change: Partial<FitSpecification>): FitSpecification {
  return {
    target: { column: 'progression', transform: 'none' },
    inputs: reference.names.map((column) => ({ column })),
    method: 'ridge',
    weightColumn: 'weight',
    validation: { scheme: 'grouped', folds: 10, column: 'fold' },
    ...change,
  };
}

describe.each([
  ['equal weights', reference.equal],
  ['unequal weights', reference.weighted],
])(`diabetes data with %s (${reference.source})`, (_, expected) => {
  const fit = (change: Partial<FitSpecification>) => fitRecords(records(expected.weights), specification(change));

  it('gives the least squares weights to 1e-12', async () => {
    const { result } = await fit({ method: 'least-squares' });
    expect(
      relativeDifference(
        result.weights.map((weight) => weight.standardised),
        expected.leastSquares.standardised,
      ),
    ).toBeLessThan(1e-12);
    expect(
      relativeDifference(
        result.weights.map((weight) => weight.value),
        expected.leastSquares.values,
      ),
    ).toBeLessThan(1e-12);
    expect(relativeDifference([result.intercept], [expected.leastSquares.intercept])).toBeLessThan(1e-11);
  });

  it('gives the whole ridge path: the same penalties, degrees of freedom, weights and held-out errors to 1e-8', async () => {
    const { path } = (await fit({ penalty: { rule: 'minimum' } })).result;
    expect(
      relativeDifference(
        path.map((point) => point.lambda / expected.ridge.lambdas[path.indexOf(point)]),
        path.map(() => 1),
      ),
    ).toBeLessThan(1e-10);
    expect(
      relativeDifference(
        path.map((point) => point.effectiveDegreesOfFreedom),
        expected.ridge.degreesOfFreedom ?? [],
      ),
    ).toBeLessThan(1e-10);
    path.forEach((point, at) => {
      expect(relativeDifference(point.standardised, expected.ridge.standardised[at])).toBeLessThan(1e-8);
      expect(Math.abs(point.cvError / expected.ridge.cvError[at] - 1)).toBeLessThan(1e-8);
      expect(Math.abs(point.cvStandardError / expected.ridge.cvStandardError[at] - 1)).toBeLessThan(1e-8);
    });
  });

  it.each([
    ['minimum', 'minimum'],
    ['one-standard-error', 'oneStandardError'],
  ] as const)('chooses the same ridge penalty by the rule %s', async (rule, position) => {
    const { penalty } = (await fit({ penalty: { rule } })).result;
    expect(Math.abs(penalty.lambda / expected.ridge.lambdas[expected.ridge[position]] - 1)).toBeLessThan(1e-10);
  });

  it('gives ridge at a fixed penalty to 1e-8', async () => {
    const { result } = await fit({ penalty: { rule: 'fixed', value: expected.ridge.lambdas[60] } });
    expect(result.penalty.lambda).toBe(expected.ridge.lambdas[60]);
    expect(
      relativeDifference(
        result.weights.map((weight) => weight.standardised),
        expected.ridge.standardised[60],
      ),
    ).toBeLessThan(1e-8);
  });

  it('gives the whole lasso path: the same penalties, active sets, weights and held-out errors to 1e-6', async () => {
    const { path } = (await fit({ method: 'lasso', penalty: { rule: 'minimum' } })).result;
    path.forEach((point, at) => {
      expect(Math.abs(point.lambda / expected.lasso.lambdas[at] - 1)).toBeLessThan(1e-10);
      expect(point.standardised.map((weight) => Math.abs(weight) > 1e-9)).toEqual(
        expected.lasso.standardised[at].map((weight) => Math.abs(weight) > 1e-9),
      );
      expect(relativeDifference(point.standardised, expected.lasso.standardised[at])).toBeLessThan(1e-6);
      expect(Math.abs(point.cvError / expected.lasso.cvError[at] - 1)).toBeLessThan(1e-6);
      expect(Math.abs(point.cvStandardError / expected.lasso.cvStandardError[at] - 1)).toBeLessThan(1e-5);
    });
  });

  it('reports a relative duality gap of at most 1e-10 for every lasso', async () => {
    const { report } = (await fit({ method: 'lasso', penalty: { rule: 'minimum' } })).result;
    expect(report.converged).toBe(true);
    expect(report.gap).toBeLessThanOrEqual(1e-10);
  });

  it('gives the elastic net at fixed penalties to 1e-6', async () => {
    for (const [at, lambda] of expected.elasticNet.lambdas.entries()) {
      const { result } = await fit({
        method: 'elastic-net',
        mixing: expected.elasticNet.mixing,
        penalty: { rule: 'fixed', value: lambda },
      });
      expect(
        relativeDifference(
          result.weights.map((weight) => weight.standardised),
          expected.elasticNet.standardised[at],
        ),
      ).toBeLessThan(1e-6);
    }
  });
});
