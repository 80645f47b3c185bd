import type { Database } from '../database/database';
import type { Page } from '../http/page';
import type { ColumnKind } from './cell-blocks';
import type { MendStep } from './mending/step-change';
import type { Outlying, Quantile } from './reading/column-statistics';
import type { Histogram } from './reading/histogram';
import type { FinishedColumn, Level } from './reading/finished-column';
import type { ReadingChoices } from './reading/reading-choices';
import {
  parsed,
  revisionColumns,
  toColumn,
  toRevision,
  toSet,
  type ColumnRow,
  type RevisionRow,
  type SetRow,
} from './record-rows';

export interface Reading {
  readonly encoding: string;
  readonly delimiter: string;
  readonly decimal: '.' | ',';
  readonly header: boolean;
  /** Of a workbook. */
  readonly sheet: string | null;
  readonly headerLine: number;
  /** Marks taken as missing beside the usual ones. */
  readonly missingMarks: readonly string[];
  /** Columns of the file that were never stored. */
  readonly setAside: readonly string[];
  /** What a person chose; the rest was found out from the file. */
  readonly choices: ReadingChoices;
  /** Columns with cells that do not fit the kind chosen for them. */
  readonly unreadable: readonly { readonly column: string; readonly count: number }[];
}

export interface PersonName {
  readonly id: string;
  readonly name: string;
}

/** How a revision was made from another one. */
export interface Mending {
  readonly steps: readonly MendStep[];
  readonly changes: readonly string[];
}

export interface NewRecordSet {
  readonly id: string;
  readonly name: string;
  readonly description: string;
  /** The last day on which its rows are kept; null keeps them. */
  readonly retainUntil: string | null;
  readonly changedAt: string;
  readonly createdAt: string;
  readonly createdBy: string;
}

export interface NewRevision {
  readonly id: string;
  readonly recordSetId: string;
  readonly number: number;
  readonly sha256: string;
  readonly rowCount: number;
  readonly columnCount: number;
  readonly byteCount: number;
  readonly fileName: string;
  readonly originalPath: string;
  readonly reading: Reading;
  /** The revision that was mended, and how; null when it came from a file. */
  readonly mendedFrom: string | null;
  readonly mending: Mending | null;
  /** The revision whose rows come first, and how many were added to it; null when nothing was appended. */
  readonly appendedTo: string | null;
  readonly appendedRowCount: number | null;
  readonly originalKept: boolean;
  readonly createdAt: string;
  readonly createdBy: string;
}

export interface RecordSetRecord extends Omit<NewRecordSet, 'createdBy'> {
  /** The number last given to a revision. */
  readonly lastNumber: number;
  readonly createdBy: PersonName;
  readonly revisionCount: number;
}

/** Without its mending, whose steps may list so many rows that only who asks for them should read them. */
export interface RevisionRecord extends Omit<NewRevision, 'createdBy' | 'mending'> {
  readonly recordSetName: string;
  /** Number of the revision that was mended or appended to, while there is one. */
  readonly basedOnNumber: number | null;
  readonly erasedAt: string | null;
  readonly createdBy: PersonName;
}

export interface ColumnRecord {
  readonly name: string;
  readonly position: number;
  readonly kind: ColumnKind;
  readonly unit: string | null;
  readonly missingCount: number;
  readonly distinctCount: number | null;
  readonly minimum: number | null;
  readonly maximum: number | null;
  readonly mean: number | null;
  readonly standardDeviation: number | null;
  readonly quantiles: readonly Quantile[] | null;
  readonly outlying: Outlying | null;
  readonly histogram: Histogram | null;
  readonly levels: readonly Level[];
}

export const nameKeyOf = (name: string): string => name.trim().toLowerCase();

export class RecordsStore {
  constructor(private readonly database: Database) {}

  async insertSet(set: NewRecordSet): Promise<void> {
    await this.database.connection('recordSets').insert({ ...set, nameKey: nameKeyOf(set.name) });
  }

  /** Its words, its retention date or its revisions have changed. */
  async markSetChanged(id: string, changedAt: string): Promise<void> {
    await this.database.connection('recordSets').where({ id }).update({ changedAt });
  }

  /** Takes the set's next number. Numbers are given once, that of a deleted revision too. */
  async takeNumber(recordSetId: string): Promise<number> {
    const sets = this.database.connection('recordSets').where({ id: recordSetId });
    await sets.clone().increment('lastNumber', 1);
    const { lastNumber } = (await sets.first('lastNumber')) as { lastNumber: number };
    return lastNumber;
  }

  async insertRevision(revision: NewRevision): Promise<void> {
    await this.database.connection('recordRevisions').insert({
      ...revision,
      reading: JSON.stringify(revision.reading),
      mending: revision.mending && JSON.stringify(revision.mending),
    });
  }

  async insertColumn(revisionId: string, column: FinishedColumn): Promise<void> {
    const { name, position, kind, unit, statistics, levels } = column;
    const figures = {
      ...statistics,
      quantiles: statistics.quantiles && JSON.stringify(statistics.quantiles),
      outlying: statistics.outlying && JSON.stringify(statistics.outlying),
      histogram: statistics.histogram && JSON.stringify(statistics.histogram),
    };
    await this.database
      .connection('recordColumns')
      .insert({ revisionId, name, position, kind, unit, ...figures, levels: JSON.stringify(levels) });
  }

  async countBlocks(revisionId: string): Promise<number> {
    const row = await this.database.connection('recordBlocks').where({ revisionId }).count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  async nameIsTaken(name: string): Promise<boolean> {
    return (
      (await this.database
        .connection('recordSets')
        .where({ nameKey: nameKeyOf(name) })
        .first('id')) !== undefined
    );
  }

  async listSets({ limit, offset }: Page): Promise<RecordSetRecord[]> {
    const rows = (await this.setsWithCounts()
      .orderBy('recordSets.name')
      .orderBy('recordSets.id')
      .limit(limit)
      .offset(offset)) as SetRow[];
    return rows.map(toSet);
  }

  async countSets(): Promise<number> {
    const row = await this.database.connection('recordSets').count({ total: '*' }).first();
    return Number(row?.['total'] ?? 0);
  }

  async findSet(id: string): Promise<RecordSetRecord | null> {
    const row = (await this.setsWithCounts().where('recordSets.id', id).first()) as SetRow | undefined;
    return row ? toSet(row) : null;
  }

  /** Newest first. */
  async revisionsOf(recordSetIds: readonly string[]): Promise<RevisionRecord[]> {
    const rows = (await this.revisions()
      .whereIn('recordRevisions.recordSetId', [...recordSetIds])
      .orderBy('recordRevisions.number', 'desc')
      .orderBy('recordRevisions.id')) as RevisionRow[];
    return rows.map(toRevision);
  }

  async findRevision(id: string): Promise<RevisionRecord | null> {
    const row = (await this.revisions().where('recordRevisions.id', id).first()) as RevisionRow | undefined;
    return row ? toRevision(row) : null;
  }

  /** How it was made from another one; null when it was not. */
  async mendingOf(revisionId: string): Promise<Mending | null> {
    const row = (await this.database.connection('recordRevisions').where({ id: revisionId }).first('mending')) as
      { mending: string | null } | undefined;
    return parsed<Mending>(row?.mending ?? null);
  }

  async columnsOf(revisionId: string): Promise<ColumnRecord[]> {
    const rows = (await this.database
      .connection('recordColumns')
      .where({ revisionId })
      .orderBy('position')) as ColumnRow[];
    return rows.map(toColumn);
  }

  /** Rows of each block; the same for every column. */
  async blockRowCounts(revisionId: string): Promise<number[]> {
    const rows = (await this.database
      .connection('recordBlocks')
      .where({ revisionId, position: 0 })
      .orderBy('block')
      .select('rowCount')) as { rowCount: number }[];
    return rows.map((row) => row.rowCount);
  }

  /** A part of a block's bytes; all of them when `length` is null. */
  async cellsOf(
    revisionId: string,
    position: number,
    block: number,
    part: { readonly start: number; readonly length: number } | null,
  ): Promise<Buffer> {
    const { connection } = this.database;
    const cells = part ? connection.raw('substr(cells, ?, ?)', [part.start + 1, part.length]) : connection.ref('cells');
    const row = (await connection('recordBlocks').where({ revisionId, position, block }).first({ cells })) as
      { cells: Buffer } | undefined;
    if (!row) throw new Error(`Block ${block} of column ${position} of revision ${revisionId} is missing.`);
    return row.cells;
  }

  private setsWithCounts() {
    const { connection } = this.database;
    const revisionCount = connection('recordRevisions')
      .count('*')
      .where('recordRevisions.recordSetId', connection.ref('recordSets.id'))
      .as('revisionCount');
    return connection('recordSets')
      .join('people', 'people.id', 'recordSets.createdBy')
      .select('recordSets.*', 'people.name as createdByName', revisionCount);
  }

  private revisions() {
    return this.database
      .connection('recordRevisions')
      .join('people', 'people.id', 'recordRevisions.createdBy')
      .join('recordSets', 'recordSets.id', 'recordRevisions.recordSetId')
      .leftJoin('recordRevisions as base', (join) =>
        join.on('base.id', 'recordRevisions.mendedFrom').orOn('base.id', 'recordRevisions.appendedTo'),
      )
      .select(...revisionColumns, 'people.name as createdByName', 'recordSets.name as recordSetName')
      .select('base.number as basedOnNumber');
  }
}
