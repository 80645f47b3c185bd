import { fitRecords } from '../../service/src/regression/fit';
import { evaluateFormula } from '../../service/src/regression/formula/evaluate';
import { seededRandom } from '../../service/src/regression/random';
import type { FitMethod, FitSpecification } from '../../service/src/regression/specification';
import { inventedRefits } from './invented-yard';
import { numeric, table } from './reference';

const METHODS: readonly FitMethod[] = ['least-squares', 'ridge', 'lasso', 'elastic-net'];
const random = seededRandom(3);
const spread = (count: number): number[] => Array.from({ length: count }, () => random() - 0.5);

const x = spread(50);
const z = spread(50);
const y = x.map((value, row) => 2 * value + z[row] + 0.1 * random());

function specification(
  method: FitMethod,
  inputs: readonly string[],
  change: Partial<FitSpecification> = {},
): FitSpecification {
  return {
    target: { column: 'y', transform: 'none' },
    inputs: inputs.map((column) => ({ column })),
    method,
    penalty: { rule: 'minimum' },
    ...change,
  };
}

function notFinite(value: unknown, path: string): string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [path];
  return value === null || typeof value !== 'object'
    ? []
    : Object.entries(value).flatMap(([key, inner]) => notFinite(inner, `${path}.${key}`));
}

const TABLES: Readonly<Record<string, readonly (readonly [string, readonly number[]])[]>> = {
  'two records': [
    ['x', [1, 2]],
    ['z', [2, 1]],
    ['y', [2, 3]],
  ],
  'a constant column': [
    ['x', x],
    ['z', x.map(() => 5)],
    ['y', y],
  ],
  'a constant target': [
    ['x', x],
    ['z', z],
    ['y', x.map(() => 4)],
  ],
  'scales from 1e-12 to 1e12': [
    ['x', x.map((value) => value * 1e12)],
    ['z', z.map((value) => value * 1e-12)],
    ['y', y.map((value) => value * 1e12)],
  ],
  'a huge offset': [
    ['x', x.map((value) => value + 1e12)],
    ['z', z],
    ['y', y.map((value) => value * 1e-12)],
  ],
  'one extreme reading': [
    ['x', x.map((value, row) => (row === 0 ? 1e9 : value))],
    ['z', z],
    ['y', y],
  ],
  'a reading that a single record has': [
    ['x', x.map((_, row) => (row === 7 ? 1 : 0))],
    ['z', z],
    ['y', y],
  ],
  'no noise at all': [
    ['x', x],
    ['z', z],
    ['y', x.map((value, row) => 3 * value - 2 * z[row] + 1)],
  ],
};

describe.each(METHODS)('%s', (method) => {
  it.each(Object.keys(TABLES))('gives finite figures throughout with %s', async (name) => {
    const columns = TABLES[name].map(([column, values]) => numeric(column, values));
    // Two records cannot carry two weights and an intercept without a penalty.
    const inputs = name === 'two records' ? ['x'] : ['x', 'z'];
    const { result, formula } = await fitRecords(table(columns), specification(method, inputs));
    expect(notFinite(result, 'result')).toEqual([]);
    expect(notFinite(formula, 'formula')).toEqual([]);
    expect(notFinite(evaluateFormula(formula, { x: 0.1, z: 0.2 }), 'evaluation')).toEqual([]);
    expect(result.report.converged).toBe(true);
  });

  it('gives the same bits twice', async () => {
    const records = inventedRefits(200, 5);
    const wanted = specification(method, ['length', 'waterline', 'hull'], {
      target: { column: 'labour', transform: 'log' },
    });
    expect(await fitRecords(records, wanted)).toEqual(await fitRecords(records, wanted));
  });

  it('leaves records of weight 0 out, as if they were not there', async () => {
    const columns = [numeric('x', x), numeric('z', z), numeric('y', y)];
    const weights = x.map((_, row) => (row % 5 === 0 ? 0 : 1));
    const fold = x.map((_, row) => Math.floor(row / 13));
    const kept = (values: readonly number[]): number[] => values.filter((_, row) => row % 5 !== 0);
    const validation = { scheme: 'grouped', folds: 5, column: 'fold' } as const;
    const weighted = await fitRecords(
      table([...columns, numeric('w', weights), numeric('fold', fold)]),
      specification(method, ['x', 'z'], { weightColumn: 'w', validation }),
    );
    const without = await fitRecords(
      table([numeric('x', kept(x)), numeric('z', kept(z)), numeric('y', kept(y)), numeric('fold', kept(fold))]),
      specification(method, ['x', 'z'], { validation }),
    );
    weighted.result.weights.forEach((weight, at) =>
      expect(weight.standardised).toBeCloseTo(without.result.weights[at].standardised, 12),
    );
    expect(weighted.result.accuracy.rmse).toBeCloseTo(without.result.accuracy.rmse, 12);
  });

  it('takes splines, gaps, categories and a date together, and converges', async () => {
    const { result } = await fitRecords(inventedRefits(300, 5), {
      ...specification(method, []),
      target: { column: 'labour', transform: 'log' },
      inputs: [
        { column: 'length', transform: 'spline' },
        { column: 'waterline', transform: 'spline', knots: 7 },
        { column: 'draught', missing: 'typical', transform: 'spline' },
        { column: 'hull' },
        { column: 'yard' },
        { column: 'booked' },
      ],
    });
    expect(notFinite(result, 'result')).toEqual([]);
    expect(result.report.converged).toBe(true);
    expect(result.accuracy.r2).toBeGreaterThan(0.8);
  });

  it('is trained on earlier records only when folds go forward in time', async () => {
    const day = y.map((_, row) => row);
    const columns = [
      numeric('x', x),
      numeric(
        'y',
        y.map((value, row) => value + (row >= 40 ? 100 : 0)),
      ),
      numeric('day', day),
    ];
    const validation = { scheme: 'forward', column: 'day', folds: 4, gap: 3 } as const;
    const { result } = await fitRecords(table(columns), specification(method, ['x'], { validation }));
    // The jump of 100 in the last fifth cannot be foreseen from before it.
    expect(result.accuracy.rmse).toBeGreaterThan(45);
  });
});

describe('what cannot be fitted is refused by name', () => {
  const columns = [
    numeric('x', x),
    numeric('z', z),
    numeric('copy', x),
    numeric(
      'flat',
      x.map(() => 1),
    ),
    numeric('y', y),
  ];
  const refusal = (code: string, column?: string): unknown =>
    expect.objectContaining(column === undefined ? { code } : { code, column });
  const fit = (change: Partial<FitSpecification>) =>
    fitRecords(table(columns), specification('ridge', ['x', 'z'], change));

  it.each([
    ['a column that does not exist', { inputs: [{ column: 'length' }] }, 'column-not-found', 'length'],
    ['only constant inputs', { inputs: [{ column: 'flat' }] }, 'no-usable-input', undefined],
    [
      'duplicate inputs without a penalty',
      { method: 'least-squares', inputs: [{ column: 'x' }, { column: 'copy' }] },
      'not-identifiable',
      'copy',
    ],
    [
      'duplicate free inputs',
      { inputs: [{ column: 'x', penaltyFactor: 0 }, { column: 'copy', penaltyFactor: 0 }, { column: 'z' }] },
      'not-identifiable',
      undefined,
    ],
    [
      'duplicates at penalty 0',
      { inputs: [{ column: 'x' }, { column: 'copy' }], penalty: { rule: 'fixed', value: 0 } },
      'not-identifiable',
      undefined,
    ],
    ['the same column twice', { inputs: [{ column: 'x' }, { column: 'x' }] }, 'bad-specification', 'x'],
    ['the logarithm of a negative target', { target: { column: 'y', transform: 'log' } }, 'target-not-positive', 'y'],
    [
      'the square root of a negative input',
      { inputs: [{ column: 'x', transform: 'square-root' }] },
      'transform-not-possible',
      'x',
    ],
    ['negative weights', { weightColumn: 'z', inputs: [{ column: 'x' }] }, 'weights-not-usable', 'z'],
    [
      'a rule that lasso does not have',
      { method: 'lasso', penalty: { rule: 'evidence' } },
      'bad-specification',
      undefined,
    ],
  ] as const)('%s', async (_, change, code, column) => {
    await expect(fit(change as Partial<FitSpecification>)).rejects.toEqual(refusal(code, column));
  });

  it('one record', async () => {
    await expect(
      fitRecords(table([numeric('x', [1]), numeric('y', [2])]), specification('ridge', ['x'])),
    ).rejects.toEqual(refusal('too-few-records'));
  });

  it('a missing reading where the rule is refuse', async () => {
    const gaps = table([numeric('x', [1, NaN, 3, 4]), numeric('y', [1, 2, 3, 4])]);
    await expect(fitRecords(gaps, specification('ridge', ['x']))).rejects.toEqual(refusal('missing-value', 'x'));
  });

  it('an infinite reading', async () => {
    const infinite = table([numeric('x', [1, Infinity, 3, 4]), numeric('y', [1, 2, 3, 4])]);
    await expect(fitRecords(infinite, specification('ridge', ['x']))).rejects.toEqual(refusal('value-not-finite', 'x'));
  });
});
