import type { Method } from '../../api/contract';
import type { PenaltyRule, ValidationScheme } from '../desk-types';

/** One line each, for the person who chooses. */
export interface Choice<Value extends string> {
  readonly value: Value;
  readonly name: string;
  readonly explanation: string;
}

export const methodChoices: readonly Choice<Method>[] = [
  {
    value: 'ridge',
    name: 'Ridge',
    explanation: 'Holds all weights toward zero and keeps every input. Good when inputs carry the same information.',
  },
  {
    value: 'lasso',
    name: 'Lasso',
    explanation: 'Drops the inputs that earn nothing. Good when a short form is wanted.',
  },
  {
    value: 'elastic-net',
    name: 'Elastic net',
    explanation: 'Between the two: drops some inputs, and keeps groups that belong together.',
  },
  {
    value: 'least-squares',
    name: 'Least squares',
    explanation: 'No penalty. Sound with few inputs and many records; weights swing when inputs overlap.',
  },
];

export const ruleChoices: readonly Choice<PenaltyRule>[] = [
  { value: 'minimum', name: 'Minimum', explanation: 'The penalty with the least held-out error.' },
  {
    value: 'one-standard-error',
    name: 'One standard error',
    explanation: 'The strongest penalty whose held-out error is within one standard error of the least.',
  },
  {
    value: 'leave-one-out',
    name: 'Leave-one-out',
    explanation: 'Ridge: the least error when each record in turn is held out, worked out exactly.',
  },
  {
    value: 'generalised',
    name: 'Generalised cross-validation',
    explanation: 'Ridge: leave-one-out with every record’s leverage replaced by the average.',
  },
  {
    value: 'evidence',
    name: 'Evidence',
    explanation: 'Ridge: the penalty under which the records are most probable (marginal likelihood).',
  },
  {
    value: 'prior',
    name: 'Stated prior',
    explanation: 'Ridge: you state how large a standardised weight is likely to be, as a standard deviation γ.',
  },
  { value: 'fixed', name: 'Fixed', explanation: 'You state λ itself.' },
];

export const schemeChoices: readonly Choice<ValidationScheme>[] = [
  {
    value: 'k-fold',
    name: 'K-fold',
    explanation: 'Records are dealt at random into folds; each fold is held out once.',
  },
  {
    value: 'grouped',
    name: 'Grouped',
    explanation: 'All records of one group are held out together, so the error is that for a group never seen before.',
  },
  {
    value: 'forward',
    name: 'Forward in time',
    explanation: 'Fitted on the past, held out on what came later, as the edition will be used.',
  },
];

const ridgeOnly: ReadonlySet<PenaltyRule> = new Set(['leave-one-out', 'generalised', 'evidence', 'prior']);

export function rulesFor(method: Method): readonly Choice<PenaltyRule>[] {
  if (method === 'least-squares') return [];
  return method === 'ridge' ? ruleChoices : ruleChoices.filter((choice) => !ridgeOnly.has(choice.value));
}

export function methodName(method: string): string {
  return methodChoices.find((choice) => choice.value === method)?.name ?? method;
}

export function ruleName(rule: string): string {
  return ruleChoices.find((choice) => choice.value === rule)?.name ?? rule;
}
