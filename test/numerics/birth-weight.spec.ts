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
  it('gives the lasso of glmnet at every penalty, with the same active set, to 1e-6', async () => {
    for (const [at, lambda] of reference.lasso.lambdas.entries()) {
      if (at % 4 !== 1) continue;
      const { weights } = await fitAt('lasso', lambda);
      const expected = reference.lasso.standardised[at];
      expect(
        relativeDifference(
          weights.map((weight) => weight.standardised),
          expected,
        ),
      ).toBeLessThan(1e-6);
      expect(weights.map((weight) => weight.standardised !== 0)).toEqual(expected.map((value) => value !== 0));
    }
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
