import type { Estimate, PublishedEstimator } from './contract';

/** Invented answers of the desk, for specs. */
export function estimatorExample(): PublishedEstimator {
  return {
    slug: 'refit-labour',
    name: 'Refit labour',
    targetName: 'Yard labour',
    unit: 'hours',
    description: 'Yard hours for a refit of a sailing yacht.',
    intendedUse: 'Early budgets.',
    notFor: 'Quotations.',
    cautions: ['An estimate is not a quotation.'],
    edition: 4,
    inForceSince: '2026-11-03T09:00:00Z',
    inputs: {
      type: 'object',
      required: ['length_overall', 'displacement', 'hull', 'scope'],
      properties: {
        scope: { type: 'string', title: 'Scope of work', enum: ['hull', 'deck', 'rig', 'systems'], 'x-order': 4 },
        length_overall: {
          type: 'number',
          title: 'Length overall',
          exclusiveMinimum: 0,
          'x-unit': 'm',
          'x-range': [6.2, 18.4],
          'x-typical': 10.9,
          'x-help': 'From stem to stern, without fittings.',
          'x-order': 1,
        },
        displacement: { type: 'number', title: 'Displacement', 'x-unit': 't', 'x-range': [1.1, 24], 'x-order': 2 },
        hull: { type: 'string', title: 'Hull material', enum: ['GRP', 'steel', 'wood'], 'x-order': 3 },
        winter: { type: 'boolean', title: 'Winter booking', 'x-order': 5 },
        booked: {
          type: 'string',
          format: 'date',
          title: 'Booked',
          'x-range': ['2020-01-02', '2026-06-30'],
          'x-order': 6,
        },
      },
    },
  };
}

export function estimateExample(): Estimate {
  return {
    id: 'e5k2m8q1',
    estimator: 'refit-labour',
    edition: 4,
    value: 512.3781,
    unit: 'hours',
    interval: { level: 0.9, low: 440.2, high: 590.1 },
    typical: 355.2,
    scale: 'original',
    flags: [{ code: 'outside-range', input: 'displacement', message: 'Displacement 30 t lies outside the records.' }],
    contributions: [
      { input: 'displacement', label: 'Displacement', arm: 3.1, mass: 34, contribution: 105.4 },
      { input: 'length_overall', label: 'Length overall', arm: 2.15, mass: 24, contribution: 51.7781 },
    ],
    cautions: ['An estimate is not a quotation.'],
    issuedAt: '2026-12-01T10:15:00Z',
  };
}
