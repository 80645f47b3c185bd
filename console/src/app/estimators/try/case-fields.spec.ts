import { caseFields } from './case-fields';

const schema = {
  $schema: 'https://json-schema.org/draft/2020-12/schema',
  type: 'object',
  required: ['hull', 'length'],
  properties: {
    hull: { type: 'string', title: 'Hull material', enum: ['GRP', 'steel'], 'x-order': 2, 'x-typical': 'GRP' },
    length: { type: 'number', title: 'Length overall', 'x-unit': 'm', 'x-range': [6.1, 18.4], 'x-help': 'Without the bowsprit.', 'x-order': 1, 'x-typical': 11.2 },
    ballast: { type: ['number', 'null'], 'x-order': 3 },
    booked: { type: 'string', format: 'date', 'x-order': 4 },
  },
};

describe('the fields of a case', () => {
  it('stand in the schema’s order', () => {
    expect(caseFields(schema).map((field) => field.name)).toEqual(['length', 'hull', 'ballast', 'booked']);
  });

  it('carry label, unit, range, help and the typical case', () => {
    expect(caseFields(schema)[0]).toEqual({
      name: 'length',
      label: 'Length overall',
      kind: 'number',
      unit: 'm',
      help: 'Without the bowsprit.',
      range: { least: 6.1, greatest: 18.4 },
      levels: [],
      typical: 11.2,
      required: true,
      order: 1,
    });
  });

  it('offer the levels of a category', () => {
    expect(caseFields(schema)[1]).toMatchObject({ kind: 'choice', levels: ['GRP', 'steel'], required: true });
  });

  it('read a number that may be missing and a day', () => {
    const [, , ballast, booked] = caseFields(schema);
    expect(ballast).toMatchObject({ kind: 'number', required: false, label: 'ballast' });
    expect(booked.kind).toBe('date');
  });

  it('find the levels of a category that may be missing', () => {
    const [rig] = caseFields({ properties: { rig: { anyOf: [{ enum: ['sloop', 'ketch'] }, { type: 'null' }] } } });
    expect(rig).toMatchObject({ kind: 'choice', levels: ['sloop', 'ketch'] });
  });

  it('are none when the schema has none', () => {
    expect(caseFields({})).toEqual([]);
  });
});
