import { drawBoat, type Boat, type HullMaterial } from './boats';
import { drawDay } from './days';
import { Draws, roundTo } from './draws';
import { numberedByDay, withGaps, type TableRow } from './table';
import { yardShares } from './yards';

const keels = { fin: 0.5, long: 0.22, bilge: 0.16, lifting: 0.12 } as const;
type Keel = keyof typeof keels;
const keelFactor: Readonly<Record<Keel, number>> = { fin: 1, long: 1.09, bilge: 1.14, lifting: 0.95 };
const roughness: Readonly<Record<HullMaterial, number>> = {
  'glass fibre': 1,
  timber: 1.08,
  steel: 1.03,
  aluminium: 1,
  ferrocement: 1.11,
};

export interface AntifoulingCase {
  readonly boat: Boat;
  readonly coats: number;
  readonly seasons: number;
  readonly keel: Keel;
}

export function drawAntifoulingCase(draws: Draws): AntifoulingCase {
  const coats = draws.chance(0.62) ? 2 : draws.chance(0.7) ? 1 : 3;
  return { boat: drawBoat(draws), coats, seasons: draws.whole(1, 4), keel: draws.oneOf(keels) };
}

/** A case under the names of its columns. */
export function antifoulingInputs({
  boat,
  coats,
  seasons,
  keel,
}: AntifoulingCase): Readonly<Record<string, string | number>> {
  return {
    'length overall (m)': boat.lengthOverall,
    'waterline length (m)': boat.waterlineLength,
    'beam (m)': boat.beam,
    'draught (m)': boat.draught,
    'displacement (t)': boat.displacement,
    'hull material': boat.hullMaterial,
    keel,
    coats,
    'seasons since last paint': seasons,
  };
}

/** Painted area as waterline × (beam + draught) × 0.65, eleven square metres to the litre: few inputs really count. */
function litres({ boat, coats, keel }: AntifoulingCase): number {
  const area = 0.65 * boat.waterlineLength * (boat.beam + boat.draught) * keelFactor[keel];
  return (area * coats * roughness[boat.hullMaterial]) / 11;
}

function antifoulingRow(draws: Draws): TableRow {
  const job = drawAntifoulingCase(draws);
  const painted = drawDay(draws, '2023-02-01', '2026-07-15');
  const paint = roundTo(litres(job) * draws.factor(0.08), 0.1);
  return { painted, yard: draws.oneOf(yardShares), ...antifoulingInputs(job), 'paint (l)': paint };
}

/** Four seasons of antifouling. */
export function antifoulingRows(count: number): TableRow[] {
  const draws = new Draws(3141);
  const rows = Array.from({ length: count }, () => antifoulingRow(draws));
  return numberedByDay(withGaps(rows, 'seasons since last paint', 0.05, draws), 'painted', 'A');
}
