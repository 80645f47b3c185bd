import { withUnit } from '@widget/format/number-format';
import type { ColumnComparison, RecordColumn, RevisionComparison } from '../../api/contract';
import { NO_FIGURE, countOf } from '../../ui/figure';
import { betweenReadings, meanOf, missingOf, rangeOf } from '../revision/column-words';

export const COLUMN_STATES: Readonly<Record<ColumnComparison['state'], string>> = {
  same: 'same',
  changed: 'changed',
  added: 'added',
  removed: 'removed',
};

/** `14 rows added, 3 removed, 25 changed and 1,960 unchanged.` */
export function rowsTold({ added, removed, changed, unchanged }: RevisionComparison['rows']): string {
  return `${countOf(added, 'row')} added, ${countOf(removed, 'row')} removed, ${countOf(changed, 'row')} changed and ${countOf(unchanged, 'row')} unchanged.`;
}

export function matchedTold({ key, keys }: RevisionComparison, asked: string | undefined): string {
  if (key !== null) return `Rows were matched by ${key}: it is never missing and never repeated in either revision.`;
  if (asked === '') return 'Rows were matched by their order, as you asked.';
  return keys.length === 0
    ? 'Rows were matched by their order: no column names them in both revisions without gaps and repetitions.'
    : 'Rows were matched by their order: no column clearly names them in both revisions. You can choose one.';
}

/** Columns that differ come first, then as they stand in the revision. */
export function differingFirst(columns: readonly ColumnComparison[]): readonly ColumnComparison[] {
  const rank = ({ state }: ColumnComparison): number => (state === 'same' ? 1 : 0);
  return [...columns].sort((a, b) => rank(a) - rank(b));
}

/** One figure of a column in both revisions. */
export interface FigurePair {
  readonly name: string;
  readonly from: string;
  readonly to: string;
}

export function figurePairs(
  { from, to }: ColumnComparison,
  rowCounts: { readonly from: number; readonly to: number },
): readonly FigurePair[] {
  const pair = (name: string, read: (column: RecordColumn, rowCount: number) => string): FigurePair => ({
    name,
    from: from ? read(from, rowCounts.from) : NO_FIGURE,
    to: to ? read(to, rowCounts.to) : NO_FIGURE,
  });
  const pairs = [
    pair('Missing', missingOf),
    pair('Mean', (column) => inUnit(meanOf(column), column)),
    pair('Median', medianOf),
    pair('Range', (column) => inUnit(rangeOf(column), column)),
  ];
  return pairs.filter((each) => each.from !== NO_FIGURE || each.to !== NO_FIGURE);
}

function inUnit(figure: string, { unit }: RecordColumn): string {
  return figure === NO_FIGURE ? figure : withUnit(figure, unit);
}

function medianOf(column: RecordColumn): string {
  const median = column.quantiles?.find(({ share }) => share === 0.5);
  return median ? inUnit(betweenReadings(median.value, column.kind), column) : NO_FIGURE;
}
