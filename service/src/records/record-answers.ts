import type { components } from '../../../openapi/types/desk';
import type { ColumnRecord, RecordSetRecord, RevisionRecord } from './records-store';

type Schemas = components['schemas'];

/** Levels that an answer lists; the rest are counted only. */
const listedLevels = 50;

export function toRevisionSummary(revision: RevisionRecord): Schemas['RevisionSummary'] {
  const { id, number, sha256, rowCount, columnCount, byteCount, fileName, createdAt, createdBy } = revision;
  return { id, number, sha256, rowCount, columnCount, byteCount, fileName, createdAt, createdBy: { ...createdBy } };
}

export function toRevisionAnswer(
  revision: RevisionRecord,
  columns: readonly ColumnRecord[],
): Schemas['RecordRevision'] {
  const { recordSetId, recordSetName, reading } = revision;
  return {
    ...toRevisionSummary(revision),
    recordSetId,
    recordSetName,
    reading: { ...reading },
    mending: toMending(revision),
    columns: columns.map(toColumn),
  };
}

export function toSetSummary(set: RecordSetRecord, newest: RevisionRecord): Schemas['RecordSetSummary'] {
  const { id, name, description, createdAt, createdBy, revisionCount } = set;
  return {
    id,
    name,
    description,
    createdAt,
    createdBy: { ...createdBy },
    revisionCount,
    revision: toRevisionSummary(newest),
  };
}

export function toSetDetail(
  set: RecordSetRecord,
  revisions: readonly RevisionRecord[],
  columns: readonly ColumnRecord[],
): Schemas['RecordSetDetail'] {
  const { id, name, description, createdAt, createdBy } = set;
  return {
    id,
    name,
    description,
    createdAt,
    createdBy: { ...createdBy },
    revision: toRevisionAnswer(revisions[0], columns),
    revisions: revisions.map(toRevisionSummary),
  };
}

function toColumn(column: ColumnRecord): Schemas['RecordColumn'] {
  const {
    name,
    position,
    kind,
    unit,
    missingCount,
    distinctCount,
    minimum,
    maximum,
    mean,
    standardDeviation,
    histogram,
  } = column;
  const levels = [...column.levels]
    .sort((a, b) => b.count - a.count || (a.value < b.value ? -1 : 1))
    .slice(0, listedLevels);
  return {
    name,
    position,
    kind,
    unit,
    missingCount,
    distinctCount,
    minimum,
    maximum,
    mean,
    standardDeviation,
    histogram: histogram && { edges: [...histogram.edges], counts: [...histogram.counts] },
    levels: levels.map((level) => ({ ...level })),
  };
}

function toMending({ mendedFrom, mending }: RevisionRecord): Schemas['RecordRevision']['mending'] {
  if (mendedFrom === null || mending === null) return null;
  return { from: mendedFrom, steps: [...mending.steps], changes: [...mending.changes] };
}
