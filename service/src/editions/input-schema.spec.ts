import Ajv2020 from 'ajv/dist/2020';
import addFormats from 'ajv-formats';
import type { Formula, FormulaInput } from '../regression/formula/formula';
import { inputSchemaOf } from './input-schema';

const number: FormulaInput = {
  name: 'length',
  kind: 'numeric',
  unit: 'm',
  transform: 'none',
  missing: 'refuse',
  unseenLevel: 'refuse',
  range: { min: 6, max: 16 },
  deciles: null,
  levels: null,
  missingCount: 0,
  typical: 11,
  mass: 1,
  hangs: 'load',
  coding: { form: 'linear', transform: 'none', knots: [], centres: [0], scales: [1], missingIndicator: false },
  weights: [1],
};
const hull: FormulaInput = {
  ...number,
  name: 'hull',
  kind: 'category',
  unit: null,
  range: null,
  typical: 'GRP',
  levels: [
    { level: 'GRP', count: 9 },
    { level: 'steel', count: 2 },
  ],
};
const booked: FormulaInput = {
  ...number,
  name: 'booked',
  kind: 'date',
  unit: null,
  range: { min: 20454, max: 20543.75 },
  typical: 20500.5,
};

const schemaOf = (...inputs: FormulaInput[]) =>
  inputSchemaOf({ inputs } as unknown as Formula, [
    { column: 'length', label: 'Length overall', help: 'Without the bowsprit.' },
  ]);
const propertiesOf = (...inputs: FormulaInput[]) =>
  schemaOf(...inputs)['properties'] as Record<string, Record<string, unknown>>;

function fits(input: FormulaInput, value: unknown): boolean {
  const ajv = new Ajv2020({ strict: false, allowUnionTypes: true });
  addFormats(ajv);
  return ajv.validate(schemaOf(input), { [input.name]: value });
}

describe('the input schema of a formula', () => {
  it('says of a number its title, unit, range, typical value, help and place', () => {
    expect(propertiesOf(hull, number)['length']).toEqual({
      type: 'number',
      title: 'Length overall',
      'x-unit': 'm',
      'x-range': [6, 16],
      'x-typical': 11,
      'x-help': 'Without the bowsprit.',
      'x-order': 2,
    });
  });

  it('calls an input by its column when nobody named it, and leaves out a unit that is not known', () => {
    expect(propertiesOf(hull)['hull']).toEqual({
      type: 'string',
      enum: ['GRP', 'steel'],
      title: 'hull',
      'x-typical': 'GRP',
      'x-order': 1,
    });
  });

  it('writes days as ISO 8601', () => {
    expect(propertiesOf(booked)['booked']).toMatchObject({
      type: 'string',
      format: 'date',
      'x-range': ['2026-01-01', '2026-03-31'],
      'x-typical': '2026-02-16',
    });
    expect(fits(booked, '2026-02-30')).toBe(false);
    expect(fits(booked, '2026-02-28')).toBe(true);
  });

  it('requires what may not be missing, and takes null for what may', () => {
    const optional = [number, hull, booked].map((input): FormulaInput => ({ ...input, missing: 'typical' }));
    expect(schemaOf(number, hull, booked)['required']).toEqual(['length', 'hull', 'booked']);
    expect(schemaOf(...optional)['required']).toEqual([]);
    for (const input of optional) expect(fits(input, null)).toBe(true);
    for (const input of [number, hull, booked]) expect(fits(input, null)).toBe(false);
  });

  it('takes only readings that the transform can take', () => {
    expect([fits({ ...number, transform: 'log' }, 0), fits({ ...number, transform: 'log' }, 0.1)]).toEqual([
      false,
      true,
    ]);
    expect([
      fits({ ...number, transform: 'square-root' }, -0.1),
      fits({ ...number, transform: 'square-root' }, 0),
    ]).toEqual([false, true]);
  });

  it('takes a level that was never recorded only where the specification says so', () => {
    expect(fits(hull, 'concrete')).toBe(false);
    expect(fits({ ...hull, unseenLevel: 'other' }, 'concrete')).toBe(true);
    expect(fits({ ...hull, unseenLevel: 'other' }, 3)).toBe(false);
  });

  it('takes no input that the formula does not have', () => {
    expect(schemaOf(number)['additionalProperties']).toBe(false);
  });
});
