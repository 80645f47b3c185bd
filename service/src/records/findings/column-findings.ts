import type {
  CategoryRecordColumn,
  DateRecordColumn,
  NumericRecordColumn,
  RecordColumn,
  TextRecordColumn,
} from '../../regression/records';
import { dateText } from '../reading/date-cell';
import { NumberClass, NumberReader } from '../reading/number-cell';
import { listRows, noRows, rowsText, type Finding } from './finding';
import { median, quantile, robustDeviation, sortedPresent } from './robust';

const positionsWhere = (length: number, holds: (row: number) => boolean): number[] => {
  const rows: number[] = [];
  for (let row = 0; row < length; row++) if (holds(row)) rows.push(row);
  return rows;
};

function presentValues(column: RecordColumn): Set<number | string> {
  if (column.kind === 'category') return new Set(column.codes.filter((code) => code >= 0));
  const values: Iterable<number | string | null> = column.values;
  const present = new Set<number | string>();
  for (const value of values) {
    if (value === null || Number.isNaN(value)) continue;
    present.add(value);
    if (present.size > 1) break;
  }
  return present;
}

export function findConstant(column: RecordColumn): Finding[] {
  const { size } = presentValues(column);
  if (size > 1) return [];
  const message =
    size === 0
      ? `${column.name} is empty in every row.`
      : `${column.name} has the same value in every row that has one.`;
  return [
    {
      kind: 'constant-column',
      columns: [column.name],
      message,
      remedy: 'Set the column aside: it cannot tell cases apart.',
      ...noRows,
    },
  ];
}

const plainLevel = (level: string): string => level.normalize('NFKC').trim().replace(/\s+/g, ' ').toLowerCase();

/** Levels that differ only by case or by spaces. */
export function findLevelsAlike(column: CategoryRecordColumn): Finding[] {
  const groups = new Map<string, number[]>();
  column.levels.forEach((level, code) =>
    groups.set(plainLevel(level), [...(groups.get(plainLevel(level)) ?? []), code]),
  );
  const counts = new Array<number>(column.levels.length).fill(0);
  for (const code of column.codes) if (code >= 0) counts[code]++;
  return [...groups.values()]
    .filter((codes) => codes.length > 1)
    .map((codes) =>
      levelsAlike(
        column,
        [...codes].sort((a, b) => counts[b] - counts[a]),
      ),
    );
}

function levelsAlike(column: CategoryRecordColumn, codes: readonly number[]): Finding {
  const [usual, ...others] = codes;
  const written = codes.map((code) => `“${column.levels[code]}”`).join(', ');
  return {
    kind: 'levels-alike',
    columns: [column.name],
    message: `${column.name} writes one level in ${codes.length} ways: ${written}.`,
    remedy: `Map them to “${column.levels[usual]}”, the most frequent.`,
    ...listRows(positionsWhere(column.codes.length, (row) => others.includes(column.codes[row]))),
  };
}

/** Share of numbers from which words in a column look like slips. */
const nearlyShare = 0.8;

/** A column of numbers that a few words have turned into words. */
export function findNearlyNumeric(column: CategoryRecordColumn | TextRecordColumn): Finding[] {
  const reader = new NumberReader();
  const isNumber = (text: string): boolean => reader.read(text) !== NumberClass.none;
  const levelIsNumber = column.kind === 'category' ? column.levels.map(isNumber) : [];
  const length = column.kind === 'category' ? column.codes.length : column.values.length;
  const textOf = (row: number): string | null =>
    column.kind === 'text' ? column.values[row] : (column.levels[column.codes[row]] ?? null);
  const words = positionsWhere(length, (row) => {
    const text = textOf(row);
    return text !== null && !(column.kind === 'category' ? levelIsNumber[column.codes[row]] : isNumber(text));
  });
  const present = positionsWhere(length, (row) => textOf(row) !== null).length;
  if (words.length === 0 || words.length > (1 - nearlyShare) * present) return [];
  const examples = [...new Set(words.slice(0, 1000).map(textOf))].slice(0, 3).map((text) => `“${text?.slice(0, 30)}”`);
  return [
    {
      kind: 'nearly-numeric',
      columns: [column.name],
      message: `${column.name} holds numbers but for ${rowsText(words.length)}, such as ${examples.join(', ')}.`,
      remedy: 'Set these cells to missing, or write them as numbers, so that the column can be used as a measure.',
      ...listRows(words),
    },
  ];
}

const outlyingDeviations = 8;

/** Readings far from the median, measured by the median absolute deviation; on the log scale where that is the more even one. */
export function findOutlying(column: NumericRecordColumn): Finding[] {
  const sorted = sortedPresent(column.values);
  if (sorted.length < 20 || sorted[0] === sorted[sorted.length - 1]) return [];
  const [low, middle, high] = [quantile(sorted, 0.05), quantile(sorted, 0.5), quantile(sorted, 0.95)];
  const useLog = sorted[0] > 0 && high - middle > 2 * (middle - low);
  const values = useLog ? column.values.map(Math.log) : column.values;
  const centre = median(values);
  const spread = robustDeviation(values, centre);
  if (!(spread > 0)) return [];
  const rows = positionsWhere(values.length, (row) => Math.abs(values[row] - centre) > outlyingDeviations * spread);
  if (rows.length === 0 || rows.length > 0.05 * sorted.length) return [];
  return [
    {
      kind: 'outlying-values',
      columns: [column.name],
      message: `${rowsText(rows.length)} of ${column.name} lie more than ${outlyingDeviations} deviations from the median${useLog ? ' on the log scale' : ''} (deviation: 1.4826 × median absolute deviation).`,
      remedy: 'Look at the rows; set to missing what cannot be true.',
      ...listRows(rows),
    },
  ];
}

/** Spans without a record that are long beside the usual step: ten times the median step and three times the 95th percentile. */
export function findTimeGaps(column: DateRecordColumn): Finding[] {
  const days = Float64Array.from(new Set(sortedPresent(column.values.map(Math.floor))));
  if (days.length < 20) return [];
  const steps = days.subarray(1).map((day, at) => day - days[at]);
  const ordered = steps.slice().sort();
  const long = Math.max(10 * quantile(ordered, 0.5), 3 * quantile(ordered, 0.95));
  const gaps = positionsWhere(steps.length, (at) => steps[at] > long);
  return gaps.map((at) => ({
    kind: 'time-gap',
    columns: [column.name],
    message: `${column.name} has no record between ${dateText(days[at])} and ${dateText(days[at + 1])}: ${steps[at]} days.`,
    remedy: 'Ask whether records are missing; if not, say in the description why there were none.',
    ...listRows(
      positionsWhere(
        column.values.length,
        (row) => Math.floor(column.values[row]) === days[at] || Math.floor(column.values[row]) === days[at + 1],
      ),
    ),
  }));
}
