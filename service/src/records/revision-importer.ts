import pLimit from 'p-limit';
import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import { newId } from '../database/new-id';
import { readTableInThread } from './import-thread';
import type { KeptFiles, ReceivedFile } from './kept-files';
import type { TableReading } from './reading/read-table';
import type { RecordsStore } from './records-store';
import { storeColumns } from './store-columns';
import type { CellStorage } from './storing/cell-storage';

export interface Import {
  readonly file: ReceivedFile;
  readonly fileName: string;
  readonly personId: string;
  readonly signal?: AbortSignal;
}

export interface ImporterParts {
  readonly database: Database;
  readonly records: RecordsStore;
  readonly files: KeptFiles;
  readonly cells: CellStorage;
  readonly clock: Clock;
  /** Node's own arguments for the reading thread; none when compiled. */
  readonly threadArguments: readonly string[];
}

/** Files read at the same time; the others wait, so that memory stays bounded. */
const readAtOnce = 1;

/** Turns a received file into a stored revision, wholly or not at all. */
export class RevisionImporter {
  private readonly queue = pLimit(readAtOnce);

  constructor(private readonly parts: ImporterParts) {}

  /**
   * Reads the file in a thread and stores its cells ahead in another, then stores revision and columns in one unit
   * of work together with what `around` adds; it gets a function that stores them and answers the number of rows.
   */
  async bringIn(
    given: Import,
    around: (store: (recordSetId: string, number: number) => Promise<number>) => Promise<void>,
  ): Promise<string> {
    const { database, files, cells, threadArguments } = this.parts;
    const id = newId();
    const spillPath = files.spillPathOf(given.file);
    try {
      await this.queue(async () => {
        const task = { path: given.file.path, spillPath };
        const reading = await readTableInThread(task, { nodeArguments: threadArguments, signal: given.signal });
        const keep = (): Promise<void> =>
          database.unitOfWork(() =>
            around((recordSetId, number) => this.store({ id, recordSetId, number }, reading, given)),
          );
        await cells.storeFor({ revisionId: id, table: reading, spillPath }, keep, { signal: given.signal });
      });
    } catch (error) {
      // The unit of work was undone, so the name that the file was given is undone too.
      await files.remove(files.pathOf(id));
      throw error;
    } finally {
      await files.remove(spillPath);
    }
    return id;
  }

  private async store(
    names: { readonly id: string; readonly recordSetId: string; readonly number: number },
    reading: TableReading,
    given: Import,
  ): Promise<number> {
    const { records, clock, files } = this.parts;
    const { rowCount, columns, format, decimal } = reading;
    const { sha256, byteCount } = given.file;
    await records.insertRevision({
      ...names,
      sha256,
      byteCount,
      rowCount,
      columnCount: columns.length,
      fileName: given.fileName,
      originalPath: names.id,
      mendedFrom: null,
      mending: null,
      appendedTo: null,
      appendedRowCount: null,
      originalKept: true,
      reading: {
        ...{ encoding: format.encoding, delimiter: format.delimiter, decimal, header: true },
        ...{ sheet: null, headerLine: format.headerLine, missingMarks: [], setAside: [], unreadable: [] },
      },
      createdAt: timeText(clock),
      createdBy: given.personId,
    });
    await storeColumns(records, names.id, reading);
    await files.keep(given.file, names.id);
    return rowCount;
  }
}
