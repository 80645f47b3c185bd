import { drawBoat, type Boat } from './boats';
import { drawDay } from './days';
import { Draws, roundTo } from './draws';
import { numberedByDay, withDuplicates, type TableRow } from './table';

/** The day the new crane came: slower to rig and quicker in the lift, so heavy boats gain and light ones lose. */
export const newCraneDay = '2026-04-13';

const berths = { 'north quay': 0.44, 'south quay': 0.33, 'inner basin': 0.23 } as const;
type Berth = keyof typeof berths;
const berthMinutes: Readonly<Record<Berth, number>> = { 'north quay': 0, 'south quay': 4, 'inner basin': 9 };

export interface CraneCase {
  readonly boat: Boat;
  readonly berth: Berth;
  readonly mastOut: boolean;
  readonly wind: number;
  readonly launch: boolean;
}

export function drawCraneCase(draws: Draws): CraneCase {
  const wind = Math.min(13, roundTo(4.2 * draws.factor(0.45), 0.1));
  return {
    boat: drawBoat(draws),
    berth: draws.oneOf(berths),
    mastOut: draws.chance(0.3),
    wind,
    launch: draws.chance(0.5),
  };
}

/** A case under the names of its columns. */
export function craneInputs({
  boat,
  berth,
  mastOut,
  wind,
  launch,
}: CraneCase): Readonly<Record<string, string | number>> {
  return {
    berth,
    'length overall (m)': boat.lengthOverall,
    'beam (m)': boat.beam,
    'draught (m)': boat.draught,
    'displacement (t)': boat.displacement,
    rig: boat.rig,
    'mast out': mastOut ? 'yes' : 'no',
    'wind (m/s)': wind,
    direction: launch ? 'in' : 'out',
  };
}

function minutes({ boat, berth, mastOut, wind, launch }: CraneCase, newCrane: boolean): number {
  const rigging = (newCrane ? 27 : 16) + (mastOut ? 21 : 0) + berthMinutes[berth];
  const lifting = (newCrane ? 0.95 : 1.9) * boat.displacement + 0.7 * boat.lengthOverall + (launch ? 3 : 0);
  return rigging + lifting + 0.9 * Math.max(0, wind - 4);
}

function craneRow(draws: Draws): TableRow {
  const lifted = drawDay(draws, '2022-03-01', '2026-08-31');
  const lift = drawCraneCase(draws);
  const time = minutes(lift, lifted >= newCraneDay) + 5.5 * draws.normal();
  return { lifted, ...craneInputs(lift), 'crane time (min)': Math.round(time) };
}

/** Lifts of four years and a half, a few entered twice. */
export function craneRows(count: number): TableRow[] {
  const draws = new Draws(59);
  const rows = Array.from({ length: count }, () => craneRow(draws));
  return withDuplicates(numberedByDay(rows, 'lifted', 'C'), 6, draws);
}

export const liftedBefore = (rows: readonly TableRow[], day: string): TableRow[] =>
  rows.filter((row) => String(row['lifted']) < day);
