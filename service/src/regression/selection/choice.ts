import type { PenaltyChoice } from '../result';
import type { PenaltyRule } from '../specification';
import { smallestError, withinOneStandardError, type CrossValidation } from './cross-validation';

/** Errors along the path that the rules look at; null where a rule does not apply. */
export interface ChoiceGround {
  readonly lambdas: readonly number[];
  readonly crossValidation: CrossValidation;
  readonly generalised: readonly number[] | null;
  readonly leaveOneOut: readonly number[] | null;
  readonly evidence: number | null;
  readonly settled: number | null;
}

export interface Choice {
  /** Position on the path. */
  readonly at: number;
  readonly choices: readonly PenaltyChoice[];
}

export function choosePenalty(ground: ChoiceGround, rule: PenaltyRule): Choice {
  const { lambdas, crossValidation, generalised, leaveOneOut, settled } = ground;
  const positions: Partial<Record<PenaltyRule, number>> = {
    minimum: smallestError(crossValidation.errors),
    'one-standard-error': withinOneStandardError(crossValidation),
  };
  if (generalised !== null) positions.generalised = smallestError(generalised);
  if (leaveOneOut !== null) positions['leave-one-out'] = smallestError(leaveOneOut);
  if (settled !== null) positions[rule] = lambdas.indexOf(settled);
  const choices: PenaltyChoice[] = (['minimum', 'one-standard-error', 'leave-one-out', 'generalised'] as const).flatMap(
    (name) => {
      const at = positions[name];
      return at === undefined ? [] : [{ rule: name, lambda: lambdas[at] }];
    },
  );
  if (ground.evidence !== null && rule !== 'prior') choices.push({ rule: 'evidence', lambda: ground.evidence });
  if (settled !== null && (rule === 'fixed' || rule === 'prior')) choices.push({ rule, lambda: settled });
  return { at: positions[rule] ?? positions.minimum ?? 0, choices };
}
