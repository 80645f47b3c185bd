import { fitRecords } from '../../service/src/regression/fit';
import { evaluateFormula, type CaseInputs } from '../../service/src/regression/formula/evaluate';
import type { Formula } from '../../service/src/regression/formula/formula';
import type { FitSpecification } from '../../service/src/regression/specification';
import { inventedRefits } from './invented-yard';

const records = inventedRefits(600, 7);

const specification: FitSpecification = {
  target: { column: 'labour', transform: 'log' },
  inputs: [
    { column: 'length', transform: 'spline' },
    { column: 'waterline', transform: 'log' },
    { column: 'draught', missing: 'typical' },
    { column: 'hull', unseenLevel: 'other' },
    { column: 'booked' },
  ],
  method: 'ridge',
  penalty: { rule: 'one-standard-error' },
  validation: { scheme: 'grouped', folds: 10, column: 'yard' },
};

const caseInputs: CaseInputs = { length: 11, waterline: 9.4, draught: 1.8, hull: 'steel', booked: '2021-03-04' };

let formula: Formula;
beforeAll(async () => {
  formula = (await fitRecords(records, specification)).formula;
});

describe('a formula', () => {
  it('is plain JSON without NaN or infinity', () => {
    const numbersAreFinite = (value: unknown): boolean =>
      typeof value === 'number'
        ? Number.isFinite(value)
        : value === null || typeof value !== 'object' || Object.values(value).every(numbersAreFinite);
    expect(numbersAreFinite(formula)).toBe(true);
    expect(JSON.parse(JSON.stringify(formula))).toEqual(formula);
  });

  it('gives the same bits after a journey through JSON', () => {
    const travelled = JSON.parse(JSON.stringify(formula)) as Formula;
    expect(evaluateFormula(travelled, caseInputs)).toEqual(evaluateFormula(formula, caseInputs));
  });

  it('has contributions that sum to log value − log typical', () => {
    const evaluation = evaluateFormula(formula, caseInputs);
    const sum = evaluation.contributions.reduce((total, { contribution }) => total + contribution, 0);
    expect(sum).toBeCloseTo(Math.log(evaluation.value) - Math.log(evaluation.typical), 12);
    expect(evaluation.scale).toBe('log');
  });

  it('agrees with the sum of the reported weights in original units', async () => {
    const plain = {
      ...specification,
      target: { column: 'labour', transform: 'none' as const },
      inputs: [{ column: 'length' }, { column: 'hull' }],
    };
    const fitted = await fitRecords(records, plain);
    const weight = (input: string, level?: string): number =>
      fitted.result.weights.find((row) => row.input === input && row.level === level)?.value ?? NaN;
    const expected = fitted.result.intercept + 11 * weight('length') + weight('hull', 'steel');
    expect(evaluateFormula(fitted.formula, { length: 11, hull: 'steel' }).value).toBeCloseTo(expected, 9);
  });

  it('places every input on the beam: arm × mass is the contribution of a load and minus that of a float', () => {
    const evaluation = evaluateFormula(formula, caseInputs);
    for (const { arm, mass, contribution, hangs } of evaluation.contributions) {
      expect((hangs === 'float' ? -arm : arm) * mass).toBeCloseTo(contribution, 12);
      expect(mass).toBeGreaterThanOrEqual(0);
    }
  });

  it('hangs a plain numeric input at its distance from typical in standard deviations, whatever the sign of its weight', async () => {
    const flipped = {
      ...specification,
      target: { column: 'labour', transform: 'none' as const },
      inputs: [{ column: 'waterline' }, { column: 'booked' }],
    };
    const made = await fitRecords(records, flipped);
    const evaluation = evaluateFormula(made.formula, { waterline: 12, booked: 19000 });
    made.formula.inputs.forEach((input, at) => {
      const [centre] = input.coding.centres;
      const [scale] = input.coding.scales;
      expect(evaluation.contributions[at].arm).toBeCloseTo(
        ((input.name === 'waterline' ? 12 : 19000) - centre) / scale,
        9,
      );
    });
  });

  it('gives the mass as the weighted standard deviation of the contribution over the records', async () => {
    const columns = new Map(records.columns.map((column) => [column.name, column]));
    const hull = columns.get('hull');
    const codes = hull?.kind === 'category' ? hull.codes : new Int32Array(0);
    const contributions = Array.from(codes, (code) => {
      const level = hull?.kind === 'category' ? hull.levels[code] : '';
      return evaluateFormula(formula, { ...caseInputs, hull: level }).contributions[3].contribution;
    });
    const square = contributions.reduce((sum, value) => sum + value * value, 0) / contributions.length;
    expect(formula.inputs[3].mass).toBeCloseTo(Math.sqrt(square), 10);
    expect(contributions.reduce((sum, value) => sum + value, 0)).toBeCloseTo(0, 9);
  });

  it('holds its value inside its interval', () => {
    const { interval, median } = evaluateFormula(formula, caseInputs);
    expect(interval.low).toBeLessThan(median);
    expect(interval.high).toBeGreaterThan(median);
  });

  it('flags a reading outside the recorded range and names it', () => {
    const { flags } = evaluateFormula(formula, { ...caseInputs, waterline: 40 });
    expect(flags).toContainEqual(expect.objectContaining({ code: 'outside-range', input: 'waterline' }));
  });

  it('flags readings that are each in range but unlike any record together', async () => {
    const both = {
      ...specification,
      inputs: [{ column: 'length' }, { column: 'waterline' }],
      target: { column: 'labour', transform: 'none' as const },
    };
    const { formula: made } = await fitRecords(records, both);
    expect(evaluateFormula(made, { length: 11, waterline: 9.3 }).flags).toEqual([]);
    expect(evaluateFormula(made, { length: 7, waterline: 14 }).flags.map((flag) => flag.code)).toEqual([
      'jointly-unusual',
    ]);
  });

  it('never flags one of its own records', () => {
    const [first] = records.columns;
    const values = first.kind === 'numeric' ? first.values : new Float64Array(0);
    for (let row = 0; row < 50; row += 1) {
      const given = Object.fromEntries(
        records.columns.map((column) => {
          const value = column.kind === 'category' ? column.levels[column.codes[row]] : column.values[row];
          return [column.name, typeof value === 'number' && Number.isNaN(value) ? null : value];
        }),
      );
      expect(evaluateFormula(formula, given).flags.filter((flag) => flag.code !== 'missing-filled')).toEqual([]);
    }
    expect(values).toHaveLength(600);
  });

  it('fills a missing reading where the rule allows it, and says so', () => {
    const { flags } = evaluateFormula(formula, { ...caseInputs, draught: null });
    expect(flags.map((flag) => flag.code)).toEqual(['missing-filled']);
  });

  it('refuses a missing reading where the rule is refuse', () => {
    expect(() => evaluateFormula(formula, { ...caseInputs, length: null })).toThrow(
      expect.objectContaining({ code: 'input-missing', column: 'length' }),
    );
  });

  it('gives an unseen level no contribution of its own kind, with a flag', () => {
    expect(evaluateFormula(formula, { ...caseInputs, hull: 'ferrocement' }).flags.map((flag) => flag.code)).toContain(
      'unknown-level',
    );
  });

  it('refuses an unseen level where the rule is refuse', async () => {
    const { formula: made } = await fitRecords(records, { ...specification, inputs: [{ column: 'hull' }] });
    expect(() => evaluateFormula(made, { hull: 'ferrocement' })).toThrow(
      expect.objectContaining({ code: 'unknown-level', column: 'hull' }),
    );
  });

  it.each([
    ['length', 'long'],
    ['length', Infinity],
    ['waterline', 0],
    ['booked', '2021-02-30'],
  ])('refuses %s = %s by name', (input, value) => {
    expect(() => evaluateFormula(formula, { ...caseInputs, [input]: value })).toThrow(
      expect.objectContaining({ code: 'input-not-suitable', column: input }),
    );
  });

  it('is linear beyond the outer knots of a spline', () => {
    const at = (length: number): number =>
      evaluateFormula(formula, { ...caseInputs, length }).contributions[0].contribution;
    expect(at(30) - at(29)).toBeCloseTo(at(26) - at(25), 9);
    expect(at(2) - at(1)).toBeCloseTo(at(4) - at(3), 9);
  });
});

describe('a case beyond all bounds', () => {
  it('is refused rather than answered with infinity', () => {
    const { hangs } = evaluateFormula(formula, caseInputs).contributions[4];
    const booked = hangs === 'float' ? -1e13 : 1e13;
    expect(() => evaluateFormula(formula, { ...caseInputs, booked })).toThrow(
      expect.objectContaining({ code: 'input-not-suitable' }),
    );
  });
});

describe('a record of the fit', () => {
  it('is estimated by the formula as it was fitted, missing readings, splines and levels included', async () => {
    const wanted: FitSpecification = {
      ...specification,
      inputs: [
        { column: 'length', transform: 'spline', knots: 5 },
        { column: 'draught', transform: 'spline', missing: 'typical' },
        { column: 'waterline', transform: 'square-root' },
        { column: 'hull' },
        { column: 'booked' },
      ],
    };
    for (const method of ['ridge', 'lasso', 'least-squares'] as const) {
      const made = await fitRecords(records, { ...wanted, method, penalty: { rule: 'minimum' } });
      for (const point of made.result.diagnostics.residuals.slice(0, 100)) {
        const given = Object.fromEntries(
          records.columns.map((column) => {
            const value =
              column.kind === 'category' ? column.levels[column.codes[point.row]] : column.values[point.row];
            return [column.name, typeof value === 'number' && Number.isNaN(value) ? null : value];
          }),
        );
        expect(Math.log(evaluateFormula(made.formula, given).median)).toBeCloseTo(point.fitted, 9);
      }
    }
  });
});
