import { stringify } from 'csv-stringify/sync';
import type { Draws } from './draws';

export type Cell = string | number | null;
export type TableRow = Readonly<Record<string, Cell>>;

/** A table of text as a yard would send it: comma, point, header line. */
export function toCsv(rows: readonly TableRow[]): string {
  return stringify([...rows], { columns: Object.keys(rows[0]), header: true, record_delimiter: '\n' });
}

/** In the order of their days, with a running reference in front. */
export function numberedByDay(rows: readonly TableRow[], dayColumn: string, mark: string): TableRow[] {
  const sorted = [...rows].sort((first, second) => String(first[dayColumn]).localeCompare(String(second[dayColumn])));
  return sorted.map((row, position) => ({ reference: `${mark}${10001 + position}`, ...row }));
}

/** The rows with a share of one column's cells left empty. */
export function withGaps(rows: readonly TableRow[], column: string, share: number, draws: Draws): TableRow[] {
  return rows.map((row) => (draws.chance(share) ? { ...row, [column]: null } : row));
}

/** The rows with some entered a second time, a little further down. */
export function withDuplicates(rows: readonly TableRow[], count: number, draws: Draws): TableRow[] {
  const again = new Set(draws.positions(count, rows.length));
  const result: TableRow[] = [];
  const waiting: TableRow[] = [];
  rows.forEach((row, position) => {
    result.push(row);
    if (waiting.length > 0 && draws.chance(0.3)) result.push(...waiting.splice(0, 1));
    if (again.has(position)) waiting.push(row);
  });
  return [...result, ...waiting];
}

export interface UnitFault {
  readonly column: string;
  readonly count: number;
  readonly factor: number;
  readonly digits: number;
}

/** The rows with some numbers of one column in another unit. */
export function withOtherUnit(rows: readonly TableRow[], fault: UnitFault, draws: Draws): TableRow[] {
  const wrong = new Set(draws.positions(fault.count, rows.length));
  return rows.map((row, position) => {
    const value = row[fault.column];
    if (!wrong.has(position) || typeof value !== 'number') return row;
    return { ...row, [fault.column]: Number((value * fault.factor).toFixed(fault.digits)) };
  });
}

export interface SpellingFault {
  readonly column: string;
  readonly otherwise: Readonly<Record<string, string>>;
  readonly count: number;
}

/** The rows with some words of one column spelled otherwise. */
export function withSpellings(rows: readonly TableRow[], fault: SpellingFault, draws: Draws): TableRow[] {
  const { column, otherwise, count } = fault;
  const spelled = new Set(draws.positions(count, rows.length));
  return rows.map((row, position) =>
    spelled.has(position) ? { ...row, [column]: otherwise[String(row[column])] ?? row[column] } : row,
  );
}

/** The rows with a number where one column's cell is empty. */
export const withMarks = (rows: readonly TableRow[], column: string, mark: number): TableRow[] =>
  rows.map((row) => (row[column] === null ? { ...row, [column]: mark } : row));
