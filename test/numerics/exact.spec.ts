import { fitRecords } from '../../service/src/regression/fit';
import type { FitResult } from '../../service/src/regression/result';
import type { FitSpecification } from '../../service/src/regression/specification';
import { agreeingDigits, numeric, readFixture, relativeDifference, table } from './reference';

interface RidgeExact {
  readonly lambdaSum: number;
  readonly intercept: number;
  readonly coefficients: readonly number[];
  readonly degreesOfFreedom: number;
  readonly rss: number;
  readonly generalised: number;
  readonly press: number;
  readonly leverage: readonly number[];
}

interface Exact {
  readonly source: string;
  readonly data: { readonly longley: { readonly rows: readonly (readonly number[])[] } };
  readonly ridge: { readonly longley: readonly RidgeExact[] };
  readonly lasso: {
    readonly diabetes: readonly {
      readonly l1: number;
      readonly l2: number;
      readonly intercept: number;
      readonly coefficients: readonly number[];
      readonly active: readonly number[];
    }[];
  };
}

interface Hald {
  readonly source: string;
  readonly rows: readonly (readonly number[])[];
  readonly published: {
    readonly K: readonly number[];
    readonly coefficients: readonly (readonly string[])[];
    readonly degreesK: readonly number[];
    readonly degrees: readonly string[];
  };
  readonly leaveOneOut: readonly {
    readonly lambdaSum: number;
    readonly degreesOfFreedom: number;
    readonly leverage: readonly number[];
    readonly meanSquare: number;
    readonly generalised: number;
  }[];
}

const exact = readFixture<Exact>('exact-solutions.json');
const hald = readFixture<Hald>('hald-ridge.json');
const collinear = readFixture<{
  readonly source: string;
  readonly conditionIndices: readonly number[];
  readonly printedIndices: readonly number[];
  readonly proportions: readonly (readonly number[])[];
  readonly printedFactors: readonly number[];
  readonly factors: readonly number[];
  readonly standardisedConditionNumber: number;
}>('longley-collinearity.json');

/** Rows with the target first. */
function fitRows(
  rows: readonly (readonly number[])[],
  change: Partial<FitSpecification>,
): Promise<{ result: FitResult }> {
  const inputs = rows[0].slice(1).map((_, at) =>
    numeric(
      `x${at + 1}`,
      rows.map((row) => row[at + 1]),
    ),
  );
  return fitRecords(
    table([
      ...inputs,
      numeric(
        'y',
        rows.map((row) => row[0]),
      ),
    ]),
    {
      target: { column: 'y', transform: 'none' },
      inputs: inputs.map((column) => ({ column: column.name })),
      method: 'ridge',
      validation: { scheme: 'k-fold', folds: 4 },
      ...change,
    },
  );
}

const valuesOf = (result: FitResult): number[] => [result.intercept, ...result.weights.map((weight) => weight.value)];

describe.each(exact.ridge.longley.map((fit) => [fit.lambdaSum, fit] as const))(
  `exact ridge on Longley's data, sum-form penalty %d (${exact.source.slice(0, 33)})`,
  (lambdaSum, fit) => {
    const { rows } = exact.data.longley;
    const solve = () => fitRows(rows, { penalty: { rule: 'fixed', value: lambdaSum / rows.length } });

    it('agrees to 10 digits in every coefficient, the degrees of freedom and the residuals', async () => {
      const { result } = await solve();
      const expected = [fit.intercept, ...fit.coefficients];
      valuesOf(result).forEach((value, at) => expect(agreeingDigits(value, expected[at])).toBeGreaterThan(10));
      expect(agreeingDigits(result.penalty.effectiveDegreesOfFreedom, fit.degreesOfFreedom)).toBeGreaterThan(11);
      expect(agreeingDigits(result.accuracy.trainingRmse ** 2 * rows.length, fit.rss)).toBeGreaterThan(10);
    });

    it('agrees in every leverage', async () => {
      const { result } = await solve();
      expect(
        relativeDifference(
          result.diagnostics.residuals.map((point) => point.leverage ?? NaN),
          fit.leverage,
        ),
      ).toBeLessThan(1e-7);
    });
  },
);

describe('exact lasso and elastic net on the diabetes data', () => {
  const diabetes = readFixture<{ readonly inputs: readonly (readonly number[])[]; readonly target: readonly number[] }>(
    'diabetes-reference.json',
  );
  const rows = diabetes.target.map((target, row) => [target, ...diabetes.inputs.map((column) => column[row])]);

  it.each(exact.lasso.diabetes.map((fit) => [fit.l1, fit.l2, fit] as const))(
    'agrees to 10 digits at l1 = %d, l2 = %d',
    async (l1, l2, fit) => {
      const method =
        l2 === 0 ? ({ method: 'lasso' } as const) : ({ method: 'elastic-net', mixing: l1 / (l1 + l2) } as const);
      const { result } = await fitRows(rows, {
        ...method,
        penalty: { rule: 'fixed', value: l1 + l2 },
        validation: { scheme: 'k-fold', folds: 2 },
      });
      const expected = [fit.intercept, ...fit.coefficients];
      valuesOf(result).forEach((value, at) => expect(agreeingDigits(value, expected[at])).toBeGreaterThan(10));
      const active = result.weights.flatMap((weight, at) => (weight.standardised === 0 ? [] : [at]));
      expect(active).toEqual(fit.active);
    },
  );
});

describe(`Hald's cement data (${hald.source.slice(0, 40)})`, () => {
  const rows = hald.rows.map((row) => [row[4], ...row.slice(0, 4)]);

  it.each(hald.published.K.map((penalty, at) => [penalty, hald.published.coefficients[at]] as const))(
    'gives the published ridge coefficients at K = %d',
    async (penalty, published) => {
      const { result } = await fitRows(rows, { penalty: { rule: 'fixed', value: penalty } });
      expect(valuesOf(result).map((value) => value.toFixed(5))).toEqual(
        published.map((text) => Number(text).toFixed(5)),
      );
    },
  );

  it('gives the published effective degrees of freedom', async () => {
    for (const [at, penalty] of hald.published.degreesK.entries()) {
      const { result } = await fitRows(rows, { penalty: { rule: 'fixed', value: penalty } });
      expect(result.penalty.effectiveDegreesOfFreedom.toFixed(4)).toBe(Number(hald.published.degrees[at]).toFixed(4));
    }
  });
});

describe(`collinearity of Longley's data (${collinear.source.slice(0, 34)})`, () => {
  let result: FitResult;
  beforeAll(async () => {
    ({ result } = await fitRows(exact.data.longley.rows, { method: 'least-squares' }));
  });

  it('gives the condition indices to nine digits', () => {
    result.diagnostics.conditionIndices.forEach((row, at) =>
      expect(agreeingDigits(row.index ?? NaN, collinear.conditionIndices[at])).toBeGreaterThan(9),
    );
    expect(result.diagnostics.conditionIndices).toHaveLength(7);
  });

  it('gives the variance-decomposition proportions', () => {
    collinear.proportions.forEach((expected, coefficient) => {
      const found = result.diagnostics.conditionIndices.map((row) => row.proportions[coefficient]);
      expect(relativeDifference(found, expected)).toBeLessThan(1e-8);
    });
  });

  it('gives the variance inflation factors as printed', () => {
    expect(result.diagnostics.varianceInflation.map((row) => row.factor?.toFixed(5))).toEqual(
      collinear.printedFactors.map((value) => value.toFixed(5)),
    );
  });

  it('gives the condition number of the standardised columns', () => {
    expect(agreeingDigits(result.report.conditionNumber ?? NaN, collinear.standardisedConditionNumber)).toBeGreaterThan(
      10,
    );
  });
});
