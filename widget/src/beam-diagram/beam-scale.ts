import { BeamContribution } from './contribution';

/** Arms beyond this many standard deviations hang at the end of the beam, with the arm written beside the label. */
export const LONGEST_ARM = 4;
const SHORTEST_REACH = 2;
const BEAM_BEYOND_REACH = 0.2;
/** However long the labels, the beam keeps this share of the half width; labels are shortened instead. */
const LEAST_SHARE = 0.5;
const TICK_SPACING = 46;

export interface BeamScale {
  readonly pivotX: number;
  readonly halfLength: number;
  readonly pixelsPerArm: number;
}

export interface ScaleTick {
  readonly arm: number;
  readonly x: number;
}

/** What an input needs outward of its place: half its width, the gap and its label. */
export interface OutwardNeed {
  readonly arm: number;
  readonly room: number;
}

export function clampArm(arm: number): number {
  return Math.max(-LONGEST_ARM, Math.min(LONGEST_ARM, arm));
}

/** The longest beam on which every label still stands inside the picture. */
export function scaleFor(needs: readonly OutwardNeed[], width: number, margin: number): BeamScale {
  const half = width / 2;
  const reach = needs.reduce((most, { arm }) => Math.max(most, Math.abs(clampArm(arm))), SHORTEST_REACH);
  const longest = half - margin;
  const perArm = needs.reduce(
    (least, { arm, room }) => {
      const distance = Math.abs(clampArm(arm));
      return distance === 0 ? least : Math.min(least, (longest - room) / distance);
    },
    longest / (reach + BEAM_BEYOND_REACH),
  );
  const pixelsPerArm = Math.max(perArm, (LEAST_SHARE * half) / (reach + BEAM_BEYOND_REACH));
  return { pivotX: half, pixelsPerArm, halfLength: pixelsPerArm * (reach + BEAM_BEYOND_REACH) };
}

export function placeOf(arm: number, { pivotX, pixelsPerArm }: BeamScale): number {
  return pivotX + clampArm(arm) * pixelsPerArm;
}

export function ticksOf(scale: BeamScale): readonly ScaleTick[] {
  const last = Math.floor(scale.halfLength / scale.pixelsPerArm + 1e-9);
  const stride = Math.max(1, Math.ceil(TICK_SPACING / scale.pixelsPerArm));
  const arms = Array.from({ length: Math.floor(last / stride) }, (_, index) => (index + 1) * stride);
  return [...arms.map((arm) => -arm).reverse(), 0, ...arms].map((arm) => ({ arm, x: placeOf(arm, scale) }));
}

export function isBeyond({ arm }: Pick<BeamContribution, 'arm'>): boolean {
  return Math.abs(arm) > LONGEST_ARM;
}
