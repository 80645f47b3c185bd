import type { Request } from 'express';
import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import { newId } from '../../database/new-id';
import { DeskError } from '../../errors';
import type { KeptFiles } from '../kept-files';
import type { ReadingChoices } from '../reading/reading-choices';
import { receiveUpload } from '../receive-upload';
import type { RecordTasks, TaskWork } from '../tasks/record-tasks';
import type { BringingIn, FileToBringIn } from './bringing-in';
import type { IncomingFileRecord, IncomingFilesStore } from './incoming-files-store';
import type { ReadingProposals } from './reading-proposals';

type Schemas = components['schemas'];

export interface IncomingFilesParts {
  readonly incoming: IncomingFilesStore;
  readonly files: KeptFiles;
  readonly proposals: ReadingProposals;
  readonly bringingIn: BringingIn;
  readonly tasks: RecordTasks;
  readonly clock: Clock;
  readonly maximumFileBytes: number;
}

/** How long a file waits for its sender; bringing it in begins the time anew. */
const keptMs = 24 * 60 * 60 * 1000;

/** Files that have arrived and do not count yet. Each is its sender's own: for everybody else there is none. */
export class IncomingFilesService {
  constructor(private readonly parts: IncomingFilesParts) {}

  /** A file that cannot be read at all is refused with its problem, and nothing of it stays. */
  async receive(personId: string, request: Request, signal: AbortSignal): Promise<Schemas['IncomingFile']> {
    const { files, incoming, proposals, clock, maximumFileBytes } = this.parts;
    const { file, fileName } = await receiveUpload(request, files, maximumFileBytes);
    try {
      const proposal = await proposals.of(file.path, {}, { signal });
      signal.throwIfAborted();
      const { sha256, byteCount } = file;
      const times = { receivedAt: timeText(clock), keptUntil: this.keptFromNow() };
      const path = files.nameOf(file);
      const row = { id: newId(), fileName, path, sha256, byteCount, ...times, createdBy: personId };
      await incoming.insert(row);
      return toAnswer(row, proposal);
    } catch (error) {
      await files.remove(file.path);
      throw error;
    }
  }

  async read(personId: string, id: string, signal: AbortSignal): Promise<Schemas['IncomingFile']> {
    const row = await this.require(personId, id);
    return toAnswer(row, await this.propose(personId, id, { choices: {}, signal }));
  }

  /** How the file would be read with these choices, perhaps below the rows of a revision. */
  async propose(
    personId: string,
    id: string,
    wanted: { readonly choices: ReadingChoices; readonly appendTo?: string; readonly signal: AbortSignal },
  ): Promise<Schemas['ReadingProposal']> {
    const { files, proposals } = this.parts;
    const row = await this.require(personId, id);
    return this.whileThere(
      () => this.requireBytes(row),
      () => proposals.of(files.pathOf(row.path), wanted.choices, wanted),
    );
  }

  /** While it is being brought in, this ends that work: nothing of it is kept. */
  async discard(personId: string, id: string): Promise<void> {
    const { path } = await this.find(personId, id);
    await this.parts.incoming.remove(id);
    await this.parts.files.remove(this.parts.files.pathOf(path));
  }

  async bringIn(personId: string, id: string, request: Schemas['BringInRequest']): Promise<Schemas['RecordTask']> {
    const { incoming, bringingIn, tasks } = this.parts;
    const row = await this.require(personId, id);
    const work = await bringingIn.workOf(this.given(row, request.choices), request.as);
    await incoming.keepUntil(id, this.keptFromNow());
    return tasks.start({ ...work, run: (context) => this.run(row, work, context) });
  }

  private given(
    { id, path, fileName, createdBy, ...facts }: IncomingFileRecord,
    choices: ReadingChoices,
  ): FileToBringIn {
    const { incoming, files } = this.parts;
    const alongside = async (): Promise<void> => {
      if (!(await incoming.remove(id))) throw gone(fileName);
    };
    return { file: files.received(path, facts), fileName, personId: createdBy, choices, alongside };
  }

  private async run(
    row: IncomingFileRecord,
    work: TaskWork,
    context: Parameters<TaskWork['run']>[0],
  ): ReturnType<TaskWork['run']> {
    await this.requireStill(row);
    return this.whileThere(
      () => this.requireStill(row),
      () => work.run(context),
    );
  }

  /** Work that failed for want of the file, which was let go meanwhile, tells whoever asked so. */
  private async whileThere<Result>(requireFile: () => Promise<void>, work: () => Promise<Result>): Promise<Result> {
    try {
      return await work();
    } catch (error) {
      if (!(error instanceof DeskError)) await requireFile();
      throw error;
    }
  }

  private keptFromNow(): string {
    return new Date(this.parts.clock.now().getTime() + keptMs).toISOString();
  }

  private async require(personId: string, id: string): Promise<IncomingFileRecord> {
    const row = await this.find(personId, id);
    await this.requireBytes(row);
    return row;
  }

  private async find(personId: string, id: string): Promise<IncomingFileRecord> {
    const row = await this.parts.incoming.findOf(personId, id);
    if (!row)
      throw new DeskError(
        'not-found',
        'There is no such file that you have sent. It may have been brought in, let go, or kept longer than a day; send it again.',
      );
    return row;
  }

  /** It may have been discarded, or brought in by a task before this one. */
  private async requireStill(row: IncomingFileRecord): Promise<void> {
    if (!(await this.parts.incoming.keepUntil(row.id, this.keptFromNow()))) throw gone(row.fileName);
    await this.requireBytes(row);
  }

  /** A crash of the machine may take the file, or a part of it, and leave its row, which then goes as well. */
  private async requireBytes({ id, path, byteCount, fileName }: IncomingFileRecord): Promise<void> {
    const { incoming, files } = this.parts;
    if (await files.holds(path, byteCount)) return;
    const isLost = await incoming.remove(id);
    await files.remove(files.pathOf(path));
    throw isLost ? lost(fileName) : gone(fileName);
  }
}

const gone = (fileName: string): DeskError =>
  new DeskError('not-found', `${fileName} is not there any more: it was brought in already, or let go.`);

const lost = (fileName: string): DeskError =>
  new DeskError('not-found', `The service has lost ${fileName}, which had not been brought in yet. Send it again.`);

function toAnswer(row: IncomingFileRecord, proposal: Schemas['ReadingProposal']): Schemas['IncomingFile'] {
  const { id, fileName, byteCount, sha256, receivedAt, keptUntil } = row;
  return { id, fileName, byteCount, sha256, receivedAt, keptUntil, proposal };
}
