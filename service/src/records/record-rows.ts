import type { Outlying, Quantile } from './reading/column-statistics';
import type { Level } from './reading/finished-column';
import type { Histogram } from './reading/histogram';
import type {
  ColumnRecord,
  NewRecordSet,
  NewRevision,
  Reading,
  RecordSetRecord,
  RevisionRecord,
} from './records-store';

/** What the readings of files said before they said more. */
const plainReading = { sheet: null, headerLine: 1, missingMarks: [], setAside: [], unreadable: [], choices: {} };

export type SetRow = NewRecordSet & { lastNumber: number; createdByName: string; revisionCount: number };
export type RevisionRow = Omit<NewRevision, 'reading' | 'mending' | 'originalKept'> & {
  reading: string;
  originalKept: boolean | number;
  basedOnNumber: number | null;
  erasedAt: string | null;
  createdByName: string;
  recordSetName: string;
};
export type ColumnRow = Omit<ColumnRecord, 'quantiles' | 'outlying' | 'histogram' | 'levels'> & {
  quantiles: string | null;
  outlying: string | null;
  histogram: string | null;
  levels: string;
};

export const revisionColumns = [
  ...['id', 'recordSetId', 'number', 'sha256', 'rowCount', 'columnCount', 'byteCount', 'fileName', 'originalPath'],
  ...['reading', 'mendedFrom', 'appendedTo', 'appendedRowCount', 'originalKept', 'erasedAt', 'createdAt', 'createdBy'],
].map((column) => `recordRevisions.${column}`);

export const parsed = <Value>(json: string | null): Value | null =>
  json === null ? null : (JSON.parse(json) as Value);

export function toSet(row: SetRow): RecordSetRecord {
  const { id, name, description, retainUntil, lastNumber, changedAt, createdAt } = row;
  return {
    ...{ id, name, description, retainUntil, lastNumber, changedAt, createdAt },
    createdBy: { id: row.createdBy, name: row.createdByName },
    revisionCount: Number(row.revisionCount),
  };
}

export function toRevision({ createdByName, ...row }: RevisionRow): RevisionRecord {
  return {
    ...row,
    byteCount: Number(row.byteCount),
    originalKept: Boolean(row.originalKept),
    reading: { ...plainReading, ...(JSON.parse(row.reading) as Reading) },
    createdBy: { id: row.createdBy, name: createdByName },
  };
}

export const toColumn = (row: ColumnRow): ColumnRecord => ({
  ...row,
  quantiles: parsed<Quantile[]>(row.quantiles),
  outlying: parsed<Outlying>(row.outlying),
  histogram: parsed<Histogram>(row.histogram),
  levels: JSON.parse(row.levels) as Level[],
});
