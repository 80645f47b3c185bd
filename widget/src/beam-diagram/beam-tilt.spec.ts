import { STEEPEST_DEGREES, tiltOf } from './beam-tilt';
import { BeamContribution } from './contribution';

/** One estimator's masses, with the moment put on the first input. */
function caseWithSum(sum: number): BeamContribution[] {
  return [
    { input: 'displacement', arm: sum / 30, mass: 30, contribution: sum },
    { input: 'rig', arm: 0, mass: 10, contribution: 0 },
  ];
}

describe('tiltOf', () => {
  it('is level for a typical case', () => {
    expect(tiltOf(caseWithSum(0))).toBe(0);
  });

  it('grows with the sum, the same both ways', () => {
    const sums = Array.from({ length: 81 }, (_, index) => index - 40);
    const tilts = sums.map((sum) => tiltOf(caseWithSum(sum)));
    for (let index = 1; index < tilts.length; index++) {
      expect(tilts[index]).toBeGreaterThan(tilts[index - 1]);
    }
    sums.forEach((sum, index) => expect(tilts[index]).toBeCloseTo(-tiltOf(caseWithSum(-sum)), 12));
  });

  it('stops at 8 degrees', () => {
    expect(tiltOf(caseWithSum(40))).toBe(STEEPEST_DEGREES);
    expect(tiltOf(caseWithSum(4000))).toBe(8);
    expect(tiltOf(caseWithSum(-4000))).toBe(-8);
  });

  it('depends on floats only through what they add', () => {
    const loads = [{ input: 'a', arm: 1, mass: 10, contribution: 10 }];
    const floats = [{ input: 'a', arm: -1, mass: 10, contribution: 10, float: true }];
    expect(tiltOf(floats)).toBe(tiltOf(loads));
  });

  it('is level with nothing on the beam', () => {
    expect(tiltOf([])).toBe(0);
  });
});
