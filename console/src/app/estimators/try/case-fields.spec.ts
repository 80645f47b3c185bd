import { caseFields } from './case-fields';

const schema = {
  $schema: 'https://json-schema.org/draft/2020-12/schema',
  type: 'object',
  required: ['hull', 'length'],
  properties: {
    hull: { type: 'string', title: 'Hull material', enum: ['GRP', 'steel'], 'x-order': 2, 'x-typical': 'GRP' },
    length: {
      type: 'number',
      title: 'Length overall',
      'x-unit': 'm',
      'x-range': [6.1, 18.4],
      'x-help': 'Without the bowsprit.',
      'x-order': 1,
      'x-typical': 11.2,
    },
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
      days: null,
      levels: [],
      otherLevels: false,
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

  it('take levels that the records never held, where the edition does', () => {
    const known = { type: 'string', enum: ['sloop', 'ketch'] };
    const [rig, hull] = caseFields({
      properties: { rig: { anyOf: [known, { type: 'string', minLength: 1 }] }, hull: known },
    });
    expect(rig).toMatchObject({ kind: 'choice', levels: ['sloop', 'ketch'], otherLevels: true });
    expect(hull.otherLevels).toBe(false);
  });

  it('know the recorded days of a date', () => {
    const [booked] = caseFields({
      properties: { booked: { type: 'string', format: 'date', 'x-range': ['2021-01-04', '2026-10-30'] } },
    });
    expect(booked).toMatchObject({ kind: 'date', range: null, days: { first: '2021-01-04', last: '2026-10-30' } });
  });

  it('are none when the schema has none', () => {
    expect(caseFields({})).toEqual([]);
  });
});
