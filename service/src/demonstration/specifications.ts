import type { components } from '../../../openapi/types/desk';

type Specification = components['schemas']['Specification'];
type Input = components['schemas']['SpecificationInput'];

const measured: readonly Input[] = [
  { column: 'length overall (m)', label: 'Length overall', help: 'Of the hull, without bowsprit or davits.' },
  { column: 'waterline length (m)', label: 'Waterline length', help: 'Afloat and in trim.' },
  { column: 'beam (m)', label: 'Beam', help: 'At the widest.' },
  { column: 'draught (m)', label: 'Draught', help: 'Keel down.', missing: 'typical' },
  { column: 'displacement (t)', label: 'Displacement', help: 'Ready to sail, tanks half full.' },
  { column: 'ballast (t)', label: 'Ballast', help: 'Leave empty if it is not known.', missing: 'typical' },
];
const described: readonly Input[] = [
  { column: 'hull material', label: 'Hull material', unseen: 'other' },
  { column: 'rig', label: 'Rig' },
  { column: 'year built', label: 'Year built' },
  { column: 'scope of work', label: 'Scope of work' },
  { column: 'winter booking', label: 'Winter booking', help: 'October to February, when the sheds are full.' },
];

const logged = (inputs: readonly Input[]): Input[] => inputs.map((input) => ({ ...input, transform: 'log' }));
const splined = (inputs: readonly Input[], column: string): Input[] =>
  inputs.map((input) => (input.column === column ? { ...input, transform: 'spline' } : input));
const only = (inputs: readonly Input[], columns: readonly string[]): Input[] =>
  inputs.filter((input) => columns.includes(input.column));

const labour: Specification['target'] = { column: 'labour (h)', transform: 'log' };
const byYard: Specification['validation'] = { scheme: 'grouped', folds: 10, column: 'yard', seed: 1 };
const tenFolds: Specification['validation'] = { scheme: 'k-fold', folds: 10, seed: 1 };

/** The desk's first try: every measurement, nothing held toward zero. */
export const refitLeastSquares: Specification = {
  target: labour,
  inputs: [...measured, ...described],
  method: 'least-squares',
  validation: tenFolds,
};
/** Sizes multiply hours, so their logarithms add up; ridge shares the load among them. */
export const refitRidge: Specification = {
  target: labour,
  inputs: [...logged(measured), ...described],
  method: 'ridge',
  penalty: { rule: 'minimum' },
  validation: tenFolds,
};
export const refitRidgeByYard: Specification = {
  ...refitRidge,
  penalty: { rule: 'one-standard-error' },
  validation: byYard,
};
export const refitLasso: Specification = {
  ...refitRidge,
  method: 'lasso',
  penalty: { rule: 'one-standard-error' },
  validation: byYard,
};
export const refitRidgeWithCurve: Specification = {
  ...refitRidge,
  inputs: [...logged(measured), ...splined(described, 'year built')],
  validation: byYard,
};

const paintInputs: readonly Input[] = [
  ...logged(
    only(measured, ['length overall (m)', 'waterline length (m)', 'beam (m)', 'draught (m)', 'displacement (t)']),
  ),
  { column: 'hull material', label: 'Hull material', unseen: 'other' },
  { column: 'keel', label: 'Keel' },
  { column: 'coats', label: 'Coats', transform: 'log', help: 'One to three.' },
  { column: 'seasons since last paint', label: 'Seasons since last paint', missing: 'typical' },
];

export const paintRidge: Specification = {
  target: { column: 'paint (l)', transform: 'log' },
  inputs: [...paintInputs],
  method: 'ridge',
  penalty: { rule: 'minimum' },
  validation: tenFolds,
};
export const paintLasso: Specification = { ...paintRidge, method: 'lasso', penalty: { rule: 'one-standard-error' } };

const craneInputs: readonly Input[] = [
  ...only(measured, ['length overall (m)', 'beam (m)', 'draught (m)', 'displacement (t)']),
  { column: 'berth', label: 'Berth' },
  { column: 'rig', label: 'Rig' },
  { column: 'mast out', label: 'Mast out', help: 'Whether the mast comes out in the same lift.' },
  { column: 'wind (m/s)', label: 'Wind', help: 'Mean of the hour.' },
  { column: 'direction', label: 'Direction', help: 'Into the water or out of it.' },
];

export const craneRidge: Specification = {
  target: { column: 'crane time (min)', transform: 'none' },
  inputs: [...craneInputs],
  method: 'ridge',
  penalty: { rule: 'minimum' },
  validation: tenFolds,
};
export const craneForward: Specification = {
  ...craneRidge,
  validation: { scheme: 'forward', folds: 6, column: 'lifted', seed: 1 },
};
