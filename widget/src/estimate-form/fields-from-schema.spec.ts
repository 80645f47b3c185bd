import { estimatorExample } from '../api/examples.fixture';
import { fieldsFrom } from './fields-from-schema';
import { FormField } from './form-field';

function only(property: object, required = true): FormField {
  return fieldsFrom({ type: 'object', properties: { it: property }, required: required ? ['it'] : [] })[0];
}

describe('fieldsFrom', () => {
  it("follows the estimator's order and labels", () => {
    expect(fieldsFrom(estimatorExample().inputs).map(({ label }) => label)).toEqual([
      'Length overall',
      'Displacement',
      'Hull material',
      'Scope of work',
      'Winter booking',
      'Booked',
    ]);
  });

  it('makes a number field with its unit, help, bounds and recorded range', () => {
    expect(fieldsFrom(estimatorExample().inputs)[0]).toEqual({
      kind: 'number',
      name: 'length_overall',
      label: 'Length overall',
      help: 'From stem to stern, without fittings.',
      blank: 'refused',
      unit: 'm',
      whole: false,
      mayBeNegative: false,
      least: { value: 0, inclusive: false },
      greatest: null,
      recorded: { least: 6.2, greatest: 18.4 },
      example: 10.9,
    });
  });

  it.each([
    [{ type: 'number', minimum: 0 }, false],
    [{ type: 'number', 'x-range': [0, 3] }, false],
    [{ type: 'number', 'x-range': [-2, 3] }, true],
    [{ type: 'number' }, true],
  ])('lets %j be negative: %s', (property, mayBeNegative) => {
    expect(only(property)).toMatchObject({ kind: 'number', mayBeNegative });
  });

  it('wants a whole number only where no fraction is allowed', () => {
    expect(only({ type: 'integer' })).toMatchObject({ whole: true });
    expect(only({ type: ['number', 'null'] })).toMatchObject({ whole: false });
  });

  it('shows up to three levels as radio buttons and more as a list', () => {
    expect(only({ type: 'string', enum: ['a', 'b', 'c'] })).toMatchObject({ kind: 'choice', shownAs: 'radios' });
    expect(only({ type: 'string', enum: ['a', 'b', 'c', 'd'] })).toMatchObject({ kind: 'choice', shownAs: 'list' });
  });

  it('offers something else where other levels are taken as well', () => {
    const open = {
      anyOf: [
        { type: ['string', 'null'], enum: ['sloop', 'ketch', null] },
        { type: 'string', maxLength: 200 },
      ],
    };
    expect(only(open)).toMatchObject({
      kind: 'choice',
      blank: 'null',
      options: [
        { text: 'sloop', value: 'sloop' },
        { text: 'ketch', value: 'ketch' },
        { text: 'Something else', value: 'something else' },
      ],
    });
  });

  it.each([
    [1995.34, 1995],
    [10.8734, 10.9],
    [0.012345, 0.0123],
  ])('gives a plain example near the typical %d', (typical, example) => {
    expect(only({ type: 'number', 'x-typical': typical })).toMatchObject({ example });
  });

  it('asks yes or no for a boolean', () => {
    expect(only({ type: 'boolean' })).toMatchObject({
      kind: 'choice',
      options: [
        { text: 'Yes', value: true },
        { text: 'No', value: false },
      ],
    });
  });

  it('makes a date field, with its range as days or as day numbers', () => {
    const recorded = { least: '1970-01-02', greatest: '2026-06-30' };
    expect(only({ type: 'string', format: 'date', 'x-range': ['1970-01-02', '2026-06-30'] })).toMatchObject({
      kind: 'date',
      recorded,
    });
    expect(only({ type: 'string', format: 'date', 'x-range': [1, 20634] })).toMatchObject({ kind: 'date', recorded });
  });

  it('takes levels that are open to others as a text with suggestions', () => {
    expect(only({ type: 'string', examples: ['GRP', 'steel'] })).toMatchObject({
      kind: 'text',
      suggestions: ['GRP', 'steel'],
    });
  });

  it('tells what a blank field sends', () => {
    expect(only({ type: 'number' }).blank).toBe('refused');
    expect(only({ type: 'number' }, false).blank).toBe('left-out');
    expect(only({ type: ['number', 'null'] }).blank).toBe('null');
    expect(only({ type: ['string', 'null'], enum: ['a', null] })).toMatchObject({
      blank: 'null',
      options: [{ text: 'a', value: 'a' }],
    });
  });

  it.each([{}, { properties: null }, { properties: [] }, { properties: { it: 7 } }])(
    'finds no fields in %j',
    (schema) => {
      expect(fieldsFrom(schema)).toEqual([]);
    },
  );
});
