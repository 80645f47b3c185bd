import type { components } from '../../../openapi/types/desk';
import type { ColumnRecord, Mending, RecordSetRecord, RevisionRecord } from './records-store';

type Schemas = components['schemas'];

/** Levels that an answer lists; the rest are counted only. */
const listedLevels = 50;

export function toRevisionSummary(revision: RevisionRecord): Schemas['RevisionSummary'] {
  const { id, number, sha256, rowCount, columnCount, byteCount, fileName, createdAt, createdBy } = revision;
  const { originalKept, erasedAt } = revision;
  const facts = { sha256, rowCount, columnCount, byteCount, fileName, originalKept, erasedAt, createdAt };
  return {
    id,
    number,
    origin: originOf(revision),
    basedOn: basedOnOf(revision),
    ...facts,
    createdBy: { ...createdBy },
  };
}

const originOf = ({ mendedFrom, appendedTo }: RevisionRecord): Schemas['RevisionSummary']['origin'] =>
  mendedFrom !== null ? 'mended' : appendedTo !== null ? 'appended' : 'file';

function basedOnOf({ mendedFrom, appendedTo, basedOnNumber }: RevisionRecord): Schemas['RevisionSummary']['basedOn'] {
  const id = mendedFrom ?? appendedTo;
  return id === null || basedOnNumber === null ? null : { id, number: basedOnNumber };
}

/** What is told of a revision by itself only. */
export interface RevisionContents {
  readonly columns: readonly ColumnRecord[];
  readonly mending: Mending | null;
}

export function toRevisionAnswer(
  revision: RevisionRecord,
  { columns, mending }: RevisionContents,
): Schemas['RecordRevision'] {
  const { recordSetId, recordSetName, reading } = revision;
  return {
    ...toRevisionSummary(revision),
    recordSetId,
    recordSetName,
    reading: {
      ...reading,
      missingMarks: [...reading.missingMarks],
      setAside: [...reading.setAside],
      choices: reading.choices,
      unreadable: reading.unreadable.map((column) => ({ ...column })),
    },
    mending: toMending(revision.mendedFrom, mending),
    appendedRowCount: revision.appendedRowCount,
    columns: columns.map(toColumn),
  };
}

export function toSetSummary(set: RecordSetRecord, newest: RevisionRecord): Schemas['RecordSetSummary'] {
  const { id, name, description, retainUntil, createdAt, createdBy, revisionCount } = set;
  return {
    ...{ id, name, description, retainUntil, createdAt },
    createdBy: { ...createdBy },
    revisionCount,
    revision: toRevisionSummary(newest),
  };
}

export function toSetDetail(
  set: RecordSetRecord,
  revisions: readonly RevisionRecord[],
  newest: RevisionContents,
): Schemas['RecordSetDetail'] {
  const { id, name, description, retainUntil, lastNumber, changedAt, createdAt, createdBy } = set;
  return {
    ...{ id, name, description, retainUntil, lastNumber, changedAt, createdAt },
    createdBy: { ...createdBy },
    revision: toRevisionAnswer(revisions[0], newest),
    revisions: revisions.map(toRevisionSummary),
  };
}

export function toColumn(column: ColumnRecord): Schemas['RecordColumn'] {
  const { name, position, kind, unit, missingCount, distinctCount, minimum, maximum, mean, standardDeviation } = column;
  const { quantiles, outlying, histogram } = column;
  const levels = [...column.levels]
    .sort((a, b) => b.count - a.count || (a.value < b.value ? -1 : 1))
    .slice(0, listedLevels);
  return {
    ...{ name, position, kind, unit, missingCount, distinctCount, minimum, maximum, mean, standardDeviation },
    quantiles: quantiles && quantiles.map((quantile) => ({ ...quantile })),
    outlying: outlying && { ...outlying },
    histogram: histogram && { edges: [...histogram.edges], counts: [...histogram.counts] },
    levels: levels.map((level) => ({ ...level })),
  };
}

function toMending(mendedFrom: string | null, mending: Mending | null): Schemas['RecordRevision']['mending'] {
  if (mendedFrom === null || mending === null) return null;
  return { from: mendedFrom, steps: [...mending.steps], changes: [...mending.changes] };
}
