import { roundTo, type Draws } from './draws';

export const hullMaterials = {
  'glass fibre': 0.62,
  timber: 0.15,
  steel: 0.12,
  aluminium: 0.09,
  ferrocement: 0.02,
} as const;
export const rigs = { sloop: 0.56, cutter: 0.16, ketch: 0.15, yawl: 0.04, 'motor sailer': 0.09 } as const;
export type HullMaterial = keyof typeof hullMaterials;
export type Rig = keyof typeof rigs;

/** Measurements overlap as real ones do: they are all, more or less, the boat's size. */
export interface Boat {
  readonly lengthOverall: number;
  readonly waterlineLength: number;
  readonly beam: number;
  readonly draught: number;
  readonly displacement: number;
  readonly ballast: number;
  readonly hullMaterial: HullMaterial;
  readonly rig: Rig;
  readonly yearBuilt: number;
}

const materialMass: Readonly<Record<HullMaterial, number>> = {
  'glass fibre': 1,
  timber: 1.07,
  steel: 1.22,
  aluminium: 0.93,
  ferrocement: 1.33,
};

/** Newer hulls have steeper ends, so more of their length is in the water. */
const waterlineShare = (yearBuilt: number): number => 0.775 + 0.0021 * (yearBuilt - 1960);

/** Drawn again outside what the yards can haul, so that no length is heaped up at either end. */
function drawLength(draws: Draws): number {
  for (;;) {
    const length = 10.9 * draws.factor(0.24);
    if (length >= 6.2 && length <= 22) return length;
  }
}

/** Powers of length near those of similar shapes (1 for lengths, 3 for masses), with each boat's own departure. */
export function drawBoat(draws: Draws): Boat {
  const lengthOverall = drawLength(draws);
  const size = lengthOverall / 10.9;
  const yearBuilt = Math.round(2021 - 58 * draws.between(0, 1) ** 1.35);
  const hullMaterial = draws.oneOf(hullMaterials);
  const rig = draws.oneOf(rigs);
  const beam = 3.5 * size ** 0.68 * draws.factor(0.045);
  const fullness = (beam / (3.5 * size ** 0.68)) ** 0.8;
  const displacement = 6.6 * size ** 2.65 * fullness * materialMass[hullMaterial] * draws.factor(0.09);
  const ballastShare = (rig === 'motor sailer' ? 0.24 : 0.38) * draws.factor(0.08);
  return {
    lengthOverall: roundTo(lengthOverall, 0.01),
    waterlineLength: roundTo(lengthOverall * waterlineShare(yearBuilt) * draws.factor(0.02), 0.01),
    beam: roundTo(beam, 0.01),
    draught: roundTo(1.75 * size ** 0.58 * draws.factor(0.09), 0.05),
    displacement: roundTo(displacement, 0.01),
    ballast: roundTo(displacement * ballastShare, 0.01),
    hullMaterial,
    rig,
    yearBuilt,
  };
}
