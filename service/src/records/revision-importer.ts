import type { Logger } from 'pino';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { readTableInThread } from './import-thread';
import type { KeptFiles, ReceivedFile } from './kept-files';
import type { ReadingChoices } from './reading/reading-choices';
import type { TableReading } from './reading/read-table';
import type { Reading, RecordsStore, RevisionRecord } from './records-store';
import { translateFullDisk } from './storage-full';
import { storeColumns, type SpilledTable } from './store-columns';
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
  readonly log: Logger;
  /** Node's own arguments for the threads; none when compiled. */
  readonly threadArguments: readonly string[];
}

interface ReadImport {
  readonly reading: Reading;
  /** The reading's own, or with the rows of the base before it. */
  readonly table: SpilledTable & { readonly rowCount: number };
}

/** Turns a received file into a stored revision, wholly or not at all: when it fails, the file lies where it lay. */
export class RevisionImporter {
  constructor(private readonly parts: ImporterParts) {}

  /**
   * Reads the file in a thread and stores its cells ahead in another, then stores revision and columns in one unit
   * of work together with what `around` adds; it gets a function that stores them. Cancelling counts until the unit
   * of work is through. The file gets its lasting name, unless columns of it were set aside: then it is deleted.
   */
  async bringIn(given: Import, context: TaskContext, around: Around): Promise<void> {
    const { files } = this.parts;
    const spillPath = files.spillPathOf(given.file);
    let read: ReadImport | null = null;
    try {
      read = await this.read(given, spillPath, context);
      await this.keepWithCells(given, { ...read, spillPath }, context, around);
    } catch (error) {
      await this.undo(given.file, { revisionId: context.revisionId, spillPath, wasRead: read !== null });
      throw translateFullDisk(error);
    }
    await files.remove(spillPath);
    if (read.reading.setAside.length > 0) await files.remove(given.file.path);
  }

  private async keepWithCells(
    given: Import,
    read: ReadImport & { readonly spillPath: string },
    context: TaskContext,
    around: Around,
  ): Promise<void> {
    const { revisionId, signal, progress } = context;
    await this.parts.cells.storeAhead(revisionId, read.table, read.spillPath, { signal, onProgress: progress });
    signal.throwIfAborted();
    await this.keep(given, read, context, around);
  }

  /**
   * The unit of work was undone, so the name that the file was given is undone too. The spill file goes first: on a
   * full disk, cells can only be cleared in the room that it leaves. What cannot be cleared is swept later.
   */
  private async undo(
    file: ReceivedFile,
    { revisionId, spillPath, wasRead }: { revisionId: string; spillPath: string; wasRead: boolean },
  ): Promise<void> {
    const { files, cells, log } = this.parts;
    await files.remove(spillPath);
    await files.takeBack(file, revisionId);
    if (!wasRead) return;
    await cells
      .clear(revisionId)
      .catch((error: unknown) => log.error({ err: error, revisionId }, 'cells could not be cleared'));
  }

  private async read(given: Import, spillPath: string, { signal, progress }: TaskContext): Promise<ReadImport> {
    const { threadArguments } = this.parts;
    const { file, choices } = given;
    progress({ stage: 'reading', done: 0, total: file.byteCount });
    const task = { path: file.path, spillPath, choices };
    const table = await readTableInThread(task, { nodeArguments: threadArguments, signal, onProgress: progress });
    return { table, reading: readingOf(table) };
  }

  private async keep(given: Import, read: ReadImport, context: TaskContext, around: Around): Promise<void> {
    const { database, files } = this.parts;
    const { revisionId, signal } = context;
    await database.unitOfWork(async () => {
      await around((place) => this.store(revisionId, place, read, given));
      signal.throwIfAborted();
      if (read.reading.setAside.length === 0) await files.keep(given.file, revisionId);
    });
  }

  private async store(id: string, place: RevisionPlace, read: ReadImport, given: Import): Promise<StoredRevision> {
    const { records, clock } = this.parts;
    const { file, fileName, base, personId } = given;
    const { table, reading } = read;
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

const readingOf = ({ format, decimal, sheet, missingMarks, setAside, unreadable }: TableReading): Reading => ({
  ...{ encoding: format.encoding, delimiter: format.delimiter, decimal, header: true },
  ...{ sheet, headerLine: format.headerLine, missingMarks, setAside, unreadable },
});
