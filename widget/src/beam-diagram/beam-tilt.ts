import { BeamContribution, sumOf } from './contribution';

export const STEEPEST_DEGREES = 8;

/**
 * Tilt in degrees, right end down when positive. Σc / Σm is the centre of gravity of the weights, in standard deviations;
 * the tilt grows with it in proportion and stops at 8° from one standard deviation on. An estimator's masses are the
 * same for every case, so the tilt is monotone in Σc.
 */
export function tiltOf(contributions: readonly BeamContribution[]): number {
  const mass = contributions.reduce((sum, each) => sum + each.mass, 0);
  const moment = sumOf(contributions);
  if (mass <= 0) {
    return Math.sign(moment) * STEEPEST_DEGREES;
  }
  return Math.max(-1, Math.min(1, moment / mass)) * STEEPEST_DEGREES;
}
