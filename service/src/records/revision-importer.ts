import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { DeskError } from '../errors';
import { readTableInThread } from './import-thread';
import type { KeptFiles, ReceivedFile } from './kept-files';
import type { BaseColumn, ReadingChoices } from './reading/reading-choices';
import type { TableReading } from './reading/read-table';
import type { ColumnRecord, Reading, RecordsStore, RevisionRecord } from './records-store';
import { translateFullDisk } from './storage-full';
import { storeColumns, type SpilledTable } from './store-columns';
import { appendInThread } from './storing/append-thread';
import type { CellStorage } from './storing/cell-storage';
import type { TaskContext } from './tasks/record-tasks';

/** What a revision is to be made from. */
export interface Import {
  readonly file: ReceivedFile;
  readonly fileName: string;
  readonly personId: string;
  readonly choices: ReadingChoices;
  /** The revision whose rows come first; null when the file stands alone. */
  readonly base: RevisionRecord | null;
}

/** Where the revision belongs. */
export interface RevisionPlace {
  readonly recordSetId: string;
  readonly number: number;
}

/** What is told of a revision that was stored. */
export interface StoredRevision {
  readonly rowCount: number;
  readonly appendedRowCount: number | null;
  readonly setAsideCount: number;
}

export type StoreRevision = (place: RevisionPlace) => Promise<StoredRevision>;
export type Around = (store: StoreRevision) => Promise<void>;

export interface ImporterParts {
  readonly database: Database;
  readonly records: RecordsStore;
  readonly files: KeptFiles;
  readonly cells: CellStorage;
  readonly clock: Clock;
  readonly databasePath: string;
  /** Node's own arguments for the threads; none when compiled. */
  readonly threadArguments: readonly string[];
}

interface Spills {
  /** Of the file's own cells, and of them with those of the base before them. */
  readonly read: string;
  readonly whole: string;
}

interface MadeTable {
  readonly reading: Reading;
  readonly table: SpilledTable & { readonly rowCount: number };
  readonly spillPath: string;
}

/** Turns a received file into a stored revision, wholly or not at all: when it fails, the file lies where it lay. */
export class RevisionImporter {
  constructor(private readonly parts: ImporterParts) {}

  /**
   * Reads the file in a thread while another stores its cells ahead, then stores revision and columns in one unit
   * of work together with what `around` adds; it gets a function that stores them. Cancelling counts until the unit
   * of work is through. The file gets its lasting name, unless columns of it were set aside: then it is deleted.
   */
  async bringIn(given: Import, context: TaskContext, around: Around): Promise<void> {
    const { files } = this.parts;
    const spills = { read: files.spillPathOf(given.file), whole: files.newSpillPath() };
    let made: MadeTable;
    try {
      made = await this.make(given, spills, context);
      await this.keepWithCells(given, made, context, around);
    } catch (error) {
      // The spill files go first: on a full disk, cells can only be cleared in the room that they leave.
      await files.remove(spills.read, spills.whole);
      await this.undo(given.file, context.revisionId);
      throw translateFullDisk(error);
    }
    await files.remove(spills.read, spills.whole);
    if (made.reading.setAside.length > 0) await files.remove(given.file.path);
  }

  private async keepWithCells(given: Import, made: MadeTable, context: TaskContext, around: Around): Promise<void> {
    const { revisionId, signal, progress } = context;
    await this.parts.cells.storeAhead(revisionId, made.table, made.spillPath, { signal, onProgress: progress });
    signal.throwIfAborted();
    await this.keep(given, made, context, around);
  }

  /** The unit of work was undone, so the name that the file was given is undone too. */
  private async undo(file: ReceivedFile, revisionId: string): Promise<void> {
    const { files, cells } = this.parts;
    await files.takeBack(file, revisionId);
    await cells.clearFailed(revisionId);
  }

  private async make({ file, choices, base }: Import, spills: Spills, context: TaskContext): Promise<MadeTable> {
    const { revisionId, signal, progress } = context;
    const { databasePath } = this.parts;
    const watch = { nodeArguments: this.parts.threadArguments, signal, onProgress: progress };
    progress({ stage: 'reading', done: 0, total: file.byteCount });
    const task = { path: file.path, spillPath: spills.read, choices };
    if (!base) {
      const table = await readTableInThread({ ...task, ahead: { databasePath, revisionId } }, watch);
      return { table, reading: readingOf(table, choices), spillPath: spills.read };
    }
    const columns = await this.parts.records.columnsOf(base.id);
    const added = await readTableInThread({ ...task, base: columns.map(toBaseColumn) }, watch);
    requireSameColumns(columns, added, base);
    const places = { addedSpillPath: spills.read, spillPath: spills.whole };
    const table = await appendInThread({ databasePath, baseRevisionId: base.id, added, ...places }, watch);
    return { table, reading: readingOf(added, choices), spillPath: spills.whole };
  }

  private async keep(given: Import, made: MadeTable, context: TaskContext, around: Around): Promise<void> {
    const { database, files } = this.parts;
    const { revisionId, signal } = context;
    await database.unitOfWork(async () => {
      await around((place) => this.store(revisionId, place, made, given));
      signal.throwIfAborted();
      if (made.reading.setAside.length === 0) await files.keep(given.file, revisionId);
    });
  }

  private async store(id: string, place: RevisionPlace, made: MadeTable, given: Import): Promise<StoredRevision> {
    const { records, clock } = this.parts;
    const { file, fileName, base, personId } = given;
    const { table, reading } = made;
    const appendedRowCount = base && table.rowCount - base.rowCount;
    const { sha256, byteCount } = file;
    await records.insertRevision({
      ...{ id, ...place, sha256, byteCount, fileName, reading },
      rowCount: table.rowCount,
      columnCount: table.columns.length,
      // Without its original a revision still needs a name of its own here: no other's file may go with it.
      originalPath: id,
      originalKept: reading.setAside.length === 0,
      ...{ mendedFrom: null, mending: null },
      ...{ appendedTo: base && base.id, appendedRowCount },
      createdAt: timeText(clock),
      createdBy: personId,
    });
    await storeColumns(records, id, table);
    return { rowCount: table.rowCount, appendedRowCount, setAsideCount: reading.setAside.length };
  }
}

const readingOf = (
  { format, decimal, sheet, missingMarks, setAside, unreadable }: TableReading,
  choices: ReadingChoices,
): Reading => ({
  ...{ encoding: format.encoding, delimiter: format.delimiter, decimal, header: true },
  ...{ sheet, headerLine: format.headerLine, missingMarks, setAside, unreadable, choices },
});

const toBaseColumn = ({ name, kind, unit }: ColumnRecord): BaseColumn => ({ name, kind, unit });

/** Columns that only the file has were set aside by then. */
function requireSameColumns(wanted: readonly ColumnRecord[], { columns }: TableReading, base: RevisionRecord): void {
  const present = new Set(columns.map((column) => column.name));
  const lacking = wanted.map((column) => column.name).filter((name) => !present.has(name));
  if (lacking.length === 0) return;
  const listed = lacking.slice(0, 20).map((name) => `“${name}”`);
  const more = lacking.length > 20 ? ` and ${lacking.length - 20} more` : '';
  throw new DeskError(
    'columns-differ',
    `The file lacks ${lacking.length === 1 ? 'the column' : 'columns'} ${listed.join(', ')}${more} of revision ${base.number} of ${base.recordSetName}. Add what is missing, name the columns as the revision does, or bring the file in by itself.`,
  );
}
