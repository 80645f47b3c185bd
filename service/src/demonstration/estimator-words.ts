import type { components } from '../../../openapi/types/desk';

type EstimatorNew = components['schemas']['EstimatorNew'];

const ordinaryCaution =
  'An estimate is not a quotation, a survey or a lifting plan. Local rules and a licensed surveyor or lifting supervisor decide.';

export const refitLabourWords: EstimatorNew = {
  slug: 'refit-labour',
  name: 'Refit labour',
  targetName: 'Labour',
  unit: 'h',
  description: 'Hours of yard labour that a refit takes, from what the nine member yards booked on jobs like it.',
  intendedUse: 'First budgets for sailing boats of 6 to 22 m, before a yard has seen the boat.',
  notFor: 'Damage after a stranding or a fire, racing hulls, multihulls, and boats whose work has begun.',
  cautions: [ordinaryCaution, 'Materials, lifting and storage are not in the hours.'],
};

export const antifoulingWords: EstimatorNew = {
  slug: 'antifouling-paint',
  name: 'Antifouling paint',
  targetName: 'Paint',
  unit: 'l',
  description:
    'Litres of antifouling for the underwater body, from four seasons of what the yards drew from the store.',
  intendedUse: 'Ordering paint for single-hulled boats painted by brush or roller.',
  notFor: 'Sprayed coatings, bare metal that needs a priming system, and multihulls.',
  cautions: [ordinaryCaution, 'Read the tin: the maker’s coverage decides for a paint that the yards have not used.'],
};

export const craneTimeWords: EstimatorNew = {
  slug: 'crane-time',
  name: 'Crane time',
  targetName: 'Crane time',
  unit: 'min',
  description: 'Minutes that the federation’s crane is taken up by one lift, from slings on to slings off.',
  intendedUse: 'Planning a day of launching or hauling out.',
  notFor: 'Deciding whether a lift is safe: that is for the lifting supervisor, every time.',
  cautions: [ordinaryCaution, 'Nothing is lifted above 12 m/s of wind.'],
};
