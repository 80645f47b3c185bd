import { BeamContribution, sumOf } from './contribution';

export const MOST_WEIGHTS = 12;
export const THE_OTHERS = 'the others';

export interface BeamSelection {
  readonly drawn: readonly BeamContribution[];
  /** Inputs that `the others` stands for. */
  readonly gathered: readonly BeamContribution[];
}

/**
 * Twelve weights at most: the largest eleven by contribution and one load for the rest. Its contribution is their sum c,
 * its mass their masses added, M, and its arm c / M: the mean of their arms weighted by mass, so that the moment is kept.
 * An input without mass (the lasso dropped it) is not drawn while it adds nothing.
 */
export function selectWeights(contributions: readonly BeamContribution[]): BeamSelection {
  const hanging = contributions.filter(({ mass, contribution }) => mass > 0 || contribution !== 0);
  const bySize = [...hanging].sort((a, b) => Math.abs(b.contribution) - Math.abs(a.contribution) || b.mass - a.mass);
  if (bySize.length <= MOST_WEIGHTS) {
    return { drawn: bySize, gathered: [] };
  }
  const gathered = bySize.slice(MOST_WEIGHTS - 1);
  return { drawn: [...bySize.slice(0, MOST_WEIGHTS - 1), gather(gathered)], gathered };
}

function gather(contributions: readonly BeamContribution[]): BeamContribution {
  const contribution = sumOf(contributions);
  const mass = contributions.reduce((sum, each) => sum + each.mass, 0);
  return { input: THE_OTHERS, arm: mass > 0 ? contribution / mass : 0, mass, contribution };
}
