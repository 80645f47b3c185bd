import { drawBoat, type Boat, type HullMaterial, type Rig } from './boats';
import { drawDay, isWinter } from './days';
import { Draws, roundTo } from './draws';
import { numberedByDay, withGaps, type TableRow } from './table';
import { yards, yardShares } from './yards';

const scopes = {
  seasonal: 0.36,
  'survey repairs': 0.27,
  'rig and deck': 0.18,
  'engine and systems': 0.13,
  'full refit': 0.06,
} as const;
type Scope = keyof typeof scopes;

/** What multiplies the hours. Invented, but of the order of size that a yard would know. */
const scopeFactor: Readonly<Record<Scope, number>> = {
  seasonal: 0.42,
  'survey repairs': 0.8,
  'rig and deck': 1.15,
  'engine and systems': 1.5,
  'full refit': 4.4,
};
const materialFactor: Readonly<Record<HullMaterial, number>> = {
  'glass fibre': 1,
  timber: 1.42,
  steel: 1.18,
  aluminium: 1.06,
  ferrocement: 1.3,
};
const rigFactor: Readonly<Record<Rig, number>> = {
  sloop: 1,
  cutter: 1.05,
  ketch: 1.12,
  yawl: 1.09,
  'motor sailer': 1.16,
};

export interface RefitCase {
  readonly boat: Boat;
  readonly scope: Scope;
  readonly winter: boolean;
}

export function drawRefitCase(draws: Draws): RefitCase {
  return { boat: drawBoat(draws), scope: draws.oneOf(scopes), winter: draws.chance(0.46) };
}

/** A case under the names of its columns. */
export function refitInputs({ boat, scope, winter }: RefitCase): Readonly<Record<string, string | number>> {
  return {
    'length overall (m)': boat.lengthOverall,
    'waterline length (m)': boat.waterlineLength,
    'beam (m)': boat.beam,
    'draught (m)': boat.draught,
    'displacement (t)': boat.displacement,
    'ballast (t)': boat.ballast,
    'hull material': boat.hullMaterial,
    rig: boat.rig,
    'year built': boat.yearBuilt,
    'scope of work': scope,
    'winter booking': winter ? 'yes' : 'no',
  };
}

/** Hours of an ordinary yard, before its own habits and the luck of the job. */
function ordinaryHours({ boat, scope, winter }: RefitCase): number {
  const size = (boat.lengthOverall / 10.9) ** 0.75 * (boat.displacement / 6.6) ** 0.34 * (boat.beam / 3.5) ** 0.3;
  const age = Math.exp(0.0075 * (2000 - boat.yearBuilt));
  const make = materialFactor[boat.hullMaterial] * rigFactor[boat.rig];
  return 118 * size * age * make * scopeFactor[scope] * (winter ? 0.93 : 1);
}

function refitRow(draws: Draws): TableRow {
  const finished = drawDay(draws, '2020-09-01', '2026-08-31');
  const yard = draws.oneOf(yardShares);
  const refit = { ...drawRefitCase(draws), winter: draws.chance(isWinter(finished) ? 0.82 : 0.14) };
  const labour = ordinaryHours(refit) * yards[yard].effect * draws.factor(0.19);
  return { finished, yard, ...refitInputs(refit), 'labour (h)': roundTo(labour, 0.5) };
}

/** Refits of six years as the yards know them; only some measurements were never taken. */
export function refitRows(count: number): TableRow[] {
  const draws = new Draws(20260901);
  const rows = Array.from({ length: count }, () => refitRow(draws));
  const gaps = withGaps(withGaps(rows, 'ballast (t)', 0.07, draws), 'draught (m)', 0.025, draws);
  return numberedByDay(gaps, 'finished', 'R');
}

export const finishedBefore = (rows: readonly TableRow[], day: string): TableRow[] =>
  rows.filter((row) => String(row['finished']) < day);

export const finishedFrom = (rows: readonly TableRow[], day: string): TableRow[] =>
  rows.filter((row) => String(row['finished']) >= day);
