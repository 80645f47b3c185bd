import { resolveSpecification } from '../../service/src/regression/design/resolve-specification';
import { allRows, prepareContext } from '../../service/src/regression/fit-context';
import { trainingPart } from '../../service/src/regression/selection/fold-task';
import { solvePath } from '../../service/src/regression/solvers/solve-path';
import { fitRecords } from '../../service/src/regression/fit';
import type { FitSpecification } from '../../service/src/regression/specification';
import type { FitResult } from '../../service/src/regression/result';
import { category, numeric, readFixture, relativeDifference, table } from './reference';

interface Reference {
  readonly source: string;
  readonly inputs: Readonly<Record<string, readonly number[]>>;
  readonly race: readonly string[];
  readonly target: readonly number[];
  readonly weights: readonly number[];
  readonly folds: readonly number[];
  readonly lasso: {
    readonly lambdas: readonly number[];
    readonly standardised: readonly (readonly number[])[];
    readonly cvError: readonly number[];
    readonly cvStandardError: readonly number[];
  };
  readonly elasticNet: {
    readonly mixing: number;
    readonly lambdas: readonly number[];
    readonly standardised: readonly (readonly number[])[];
  };
  readonly ridge: { readonly lambdas: readonly number[]; readonly standardised: readonly (readonly number[])[] };
}

const reference = readFixture<Reference>('birth-weight-reference.json');
const records = table([
  ...Object.entries(reference.inputs).map(([name, values]) => numeric(name, values)),
  category('race', reference.race),
  numeric('grams', reference.target),
  numeric('weight', reference.weights),
  numeric('fold', reference.folds),
]);

/** Standardised weights at every λ, in the order of the columns. */
function solveAll(mixing: number, lambdas: readonly number[]): number[][] {
  const resolved = resolveSpecification({
    target: { column: 'grams', transform: 'none' },
    inputs: [...Object.keys(reference.inputs), 'race'].map((column) => ({ column })),
    weightColumn: 'weight',
    method: 'lasso',
  });
  const context = prepareContext(records, resolved, {});
  const part = trainingPart(context.design, 'orthogonal', allRows(context), []);
  const solution = solvePath(part, context.design.columns, { kind: 'descent', mixing, polish: true }, lambdas);
  return solution.weights.map((weights) => Array.from(weights));
}

async function fitAt(method: FitSpecification['method'], value: number): Promise<FitResult> {
  const { result } = await fitRecords(records, {
    target: { column: 'grams', transform: 'none' },
    inputs: [...Object.keys(reference.inputs), 'race'].map((column) => ({ column })),
    weightColumn: 'weight',
    method,
    penalty: { rule: 'fixed', value },
    validation: { scheme: 'grouped', folds: 7, column: 'fold' },
  });
  return result;
}

describe(`birth weights with a category and weights (${reference.source.slice(0, 35)})`, () => {
  it.each([
    ['lasso', 1, reference.lasso],
    ['elastic net', reference.elasticNet.mixing, reference.elasticNet],
  ])('gives the %s of glmnet over the whole path, with the same active sets, to 1e-6', (_, mixing, expected) => {
    const weights = solveAll(mixing, expected.lambdas);
    expected.standardised.forEach((standardised, at) => {
      expect(relativeDifference(weights[at], standardised)).toBeLessThan(1e-6);
      expect(weights[at].map((weight) => weight !== 0)).toEqual(standardised.map((value) => value !== 0));
    });
  });

  it('gives the cross-validation error and its standard error of cv.glmnet to 1e-6', async () => {
    for (const at of [3, 15, 27, 39]) {
      const { path, penalty } = await fitAt('lasso', reference.lasso.lambdas[at]);
      const point = path.find((candidate) => candidate.lambda === penalty.lambda);
      expect((point?.cvError ?? NaN) / reference.lasso.cvError[at]).toBeCloseTo(1, 6);
      expect((point?.cvStandardError ?? NaN) / reference.lasso.cvStandardError[at]).toBeCloseTo(1, 5);
    }
  });

  it('gives the ridge of glmnet, its λ divided by the deviation of the target, to 1e-8', async () => {
    for (const [at, lambda] of reference.ridge.lambdas.entries()) {
      const { weights } = await fitAt('ridge', lambda);
      expect(
        relativeDifference(
          weights.map((weight) => weight.standardised),
          reference.ridge.standardised[at],
        ),
      ).toBeLessThan(1e-8);
    }
  });

  it('keeps every level of the category under the penalty', async () => {
    const { weights } = await fitAt('ridge', 0.1);
    const levels = weights.filter((weight) => weight.input === 'race');
    expect(levels.map((weight) => weight.level)).toEqual(['one', 'three', 'two']);
    expect(levels.every((weight) => weight.standardised !== 0 && weight.leftOut === undefined)).toBe(true);
  });
});
