import type { CategoryRecordColumn, RecordTable } from '../../regression/records';
import { rowsText } from '../findings/finding';
import { categoryOf, Refusal, replaceColumn, type Change, type StepOf } from './step-change';

/** Levels that are equal become one, and those that no row has any more are left out. */
export function withLevels(
  column: CategoryRecordColumn,
  names: readonly string[],
  codes: Int32Array,
): CategoryRecordColumn {
  const levels: string[] = [];
  const newCodes = new Map<string, number>();
  const recoded = codes.map((code) => {
    if (code < 0) return -1;
    const name = names[code];
    const known = newCodes.get(name);
    if (known !== undefined) return known;
    newCodes.set(name, levels.push(name) - 1);
    return levels.length - 1;
  });
  return { ...column, levels, codes: recoded };
}

/** Rows whose level has another name now. */
const countChanged = ({ codes, levels }: CategoryRecordColumn, names: readonly string[]): number =>
  codes.reduce((total, code) => total + (code >= 0 && names[code] !== levels[code] ? 1 : 0), 0);

export function mapLevels(table: RecordTable, step: StepOf<'map-levels'>): Change {
  const column = categoryOf(table, step.column);
  const map = new Map(Object.entries(step.levels));
  const unknown = [...map.keys()].find((level) => !column.levels.includes(level));
  if (unknown !== undefined) throw new Refusal(`${step.column} has no level “${unknown}” at this step.`);
  const names = column.levels.map((level) => map.get(level) ?? level);
  const rowsConcerned = countChanged(column, names);
  const pairs = [...map].map(([from, to]) => `“${from}” to “${to}”`).join(', ');
  const told = `Mapped levels of ${step.column} (${pairs}) in ${rowsText(rowsConcerned)}.`;
  const mapped = withLevels(column, names, column.codes);
  return { table: replaceColumn(table, step.column, mapped), told, rowsConcerned };
}

export function joinRareLevels(table: RecordTable, step: StepOf<'join-rare-levels'>): Change {
  const column = categoryOf(table, step.column);
  const counts = new Array<number>(column.levels.length).fill(0);
  for (const code of column.codes) if (code >= 0) counts[code]++;
  const names = column.levels.map((level, code) => (counts[code] < step.fewerThan ? step.into : level));
  const joined = column.levels.filter((level, code) => names[code] !== level).length;
  const rowsConcerned = countChanged(column, names);
  const told = `Joined ${joined} levels of ${step.column} with fewer than ${step.fewerThan} rows into “${step.into}”: ${rowsText(rowsConcerned)}.`;
  const mended = withLevels(column, names, column.codes);
  return { table: replaceColumn(table, step.column, mended), told, rowsConcerned };
}
