import { once } from 'node:events';
import { extname, join } from 'node:path';
import { Readable } from 'node:stream';
import { Worker } from 'node:worker_threads';
import type { RecordsStore, RevisionRecord } from '../records-store';
import { revisionWithRows } from '../required-rows';
import type { ExportedPart, ExportTask } from './export-task';

export interface RevisionExportsParts {
  readonly records: Pick<RecordsStore, 'findRevision'>;
  readonly databasePath: string;
  /** Node's own arguments for the exporting thread; none when compiled. */
  readonly threadArguments: readonly string[];
}

export interface ExportedFile {
  readonly fileName: string;
  /** Destroying it ends the thread that fills it. */
  readonly bytes: Readable;
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const workerPath = join(__dirname, `export-worker${extname(__filename)}`);

/** Writes revisions as CSV files, each in a thread of its own and no faster than it is read. */
export class RevisionExports {
  constructor(private readonly parts: RevisionExportsParts) {}

  async open(id: string): Promise<ExportedFile> {
    const revision = await revisionWithRows(this.parts.records, id);
    const task: ExportTask = { databasePath: this.parts.databasePath, revisionId: id };
    return {
      fileName: fileNameOf(revision),
      bytes: Readable.from(partsOfThread(task, this.parts.threadArguments), { objectMode: false }),
    };
  }
}

async function* partsOfThread(task: ExportTask, threadArguments: readonly string[]): AsyncGenerator<Uint8Array> {
  const worker = new Worker(workerPath, { workerData: task, execArgv: [...threadArguments] });
  try {
    for (;;) {
      const answered = once(worker, 'message');
      worker.postMessage('next');
      const [part] = (await answered) as [ExportedPart];
      if (part === null) return;
      yield part;
    }
  } finally {
    await worker.terminate();
  }
}

/** `Boats, revision 2.csv`: no character that a file's name cannot have somewhere. */
function fileNameOf({ recordSetName, number }: RevisionRecord): string {
  const plain = recordSetName.replace(/[\\/:*?"<>|\u0000-\u001f\u007f]/g, '-').trim();
  return `${plain}, revision ${number}.csv`;
}
