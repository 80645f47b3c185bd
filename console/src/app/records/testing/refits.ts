import type {
  RecordColumn,
  RecordRevision,
  RecordRows,
  RecordSetDetail,
  RecordSetSummary,
  RevisionSummary,
} from '../../api/contract';

/** Invented records of the demonstration's yards, for specs. */
const INES = { id: 'person01', name: 'Ines Caldwell' };

export function revisionSummary(number: number): RevisionSummary {
  return {
    id: `revision${number}`,
    number,
    origin: 'file',
    basedOn: null,
    originalKept: true,
    erasedAt: null,
    sha256: String(number).repeat(64),
    rowCount: 2000 + number,
    columnCount: 3,
    byteCount: 184_320,
    fileName: `refits-${number}.csv`,
    createdAt: '2026-10-21T09:14:00Z',
    createdBy: INES,
  };
}

export const LENGTH: RecordColumn = {
  name: 'Length overall',
  position: 0,
  kind: 'numeric',
  unit: 'm',
  missingCount: 12,
  distinctCount: 312,
  minimum: 5.2,
  maximum: 24.6,
  mean: 11.83217,
  standardDeviation: 3.214,
  quantiles: [
    { share: 0.25, value: 9.4 },
    { share: 0.5, value: 11.6 },
    { share: 0.75, value: 14.1 },
  ],
  outlying: { count: 3, low: 2.1, high: 21.1, deviation: 1.9 },
  histogram: { edges: [5, 10, 25], counts: [900, 1090] },
  levels: [],
};

export const FINISHED: RecordColumn = {
  ...LENGTH,
  name: 'Finished',
  position: 1,
  kind: 'date',
  unit: null,
  missingCount: 0,
  minimum: 18_550,
  maximum: 20_740,
  mean: 19_700,
  standardDeviation: 600,
  quantiles: null,
  outlying: null,
  histogram: { edges: [18_550, 20_740], counts: [2002] },
};

export const HULL: RecordColumn = {
  ...LENGTH,
  name: 'Hull material',
  position: 2,
  kind: 'category',
  unit: null,
  missingCount: 2,
  distinctCount: 4,
  minimum: null,
  maximum: null,
  mean: null,
  standardDeviation: null,
  quantiles: null,
  outlying: null,
  histogram: null,
  levels: [
    { value: 'GRP', count: 1500 },
    { value: 'wood', count: 300 },
    { value: 'steel', count: 150 },
    { value: 'aluminium', count: 50 },
  ],
};

export const REVISION: RecordRevision = {
  ...revisionSummary(2),
  recordSetId: 'records1',
  recordSetName: 'Refits, nine yards',
  columns: [LENGTH, FINISHED, HULL],
  reading: {
    ...{ encoding: 'UTF-8', delimiter: ';', decimal: ',', header: true, sheet: null, headerLine: 1 },
    ...{ missingMarks: [], setAside: [], unreadable: [], choices: {} },
  },
};

export const ROWS: RecordRows = {
  total: 2002,
  offset: 0,
  columns: ['Length overall', 'Finished', 'Hull material'],
  numbers: [1, 2],
  rows: [
    [12.25, 18_550, 'GRP'],
    [9, 18_557, null],
  ],
};

export const RECORD_SET: RecordSetDetail = {
  id: 'records1',
  name: 'Refits, nine yards',
  description: 'One row a finished job.',
  retainUntil: null,
  lastNumber: 2,
  changedAt: '2026-10-21T09:14:00Z',
  createdAt: '2023-10-21T09:00:00Z',
  createdBy: INES,
  revision: REVISION,
  revisions: [revisionSummary(1), revisionSummary(2)],
};

export function recordSetSummary(id: string, name: string, rowCount: number): RecordSetSummary {
  return {
    id,
    name,
    description: '',
    retainUntil: null,
    createdAt: '2023-10-21T09:00:00Z',
    createdBy: INES,
    revision: { ...revisionSummary(1), rowCount },
    revisionCount: 1,
  };
}
