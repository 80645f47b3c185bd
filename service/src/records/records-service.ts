import type { Request } from 'express';
import type { components } from '../../../openapi/types/desk';
import { DeskError, notFound } from '../errors';
import type { Page } from '../http/page';
import type { Download } from '../http/send-download';
import type { BringingIn, Destination } from './incoming/bringing-in';
import { carriedChoices, hasChoices } from './incoming/carried-choices';
import type { ReadingProposals } from './incoming/reading-proposals';
import { nameTaken, readWords, type SetWords } from './incoming/record-set-words';
import type { KeptFiles, ReceivedFile } from './kept-files';
import type { ReadingChoices } from './reading/reading-choices';
import { plainFileName, receiveUpload, type Upload } from './receive-upload';
import { toRevisionAnswer, toSetDetail, toSetSummary, type RevisionContents } from './record-answers';
import type { RecordSetRecord, RecordsStore, RevisionRecord } from './records-store';
import { requireRows } from './required-rows';
import type { RecordTasks } from './tasks/record-tasks';

type Schemas = components['schemas'];

export interface RecordsParts {
  readonly records: RecordsStore;
  readonly files: KeptFiles;
  readonly bringingIn: BringingIn;
  readonly tasks: RecordTasks;
  readonly proposals: ReadingProposals;
  readonly maximumFileBytes: number;
}

export interface FileToImport {
  readonly path: string;
  readonly fileName: string;
  readonly name: string;
  readonly description: string;
  readonly personId: string;
  /** How to read it; what is absent is found out from the file. */
  readonly choices?: ReadingChoices;
}

export interface RevisionToImport extends Omit<FileToImport, 'name' | 'description'> {
  readonly recordSetId: string;
  /** The revision whose rows come first. */
  readonly appendTo?: string;
}

interface FileToFinish {
  readonly file: ReceivedFile;
  readonly fileName: string;
  readonly personId: string;
  readonly choices?: ReadingChoices;
}

export class RecordsService {
  constructor(private readonly parts: RecordsParts) {}

  async list(page: Page): Promise<Schemas['RecordSetList']> {
    const sets = await this.parts.records.listSets(page);
    const revisions = await this.parts.records.revisionsOf(sets.map((set) => set.id));
    const newest = (set: RecordSetRecord): RevisionRecord =>
      requireNewest(revisions.filter((revision) => revision.recordSetId === set.id));
    return { items: sets.map((set) => toSetSummary(set, newest(set))), total: await this.parts.records.countSets() };
  }

  async readSet(id: string): Promise<Schemas['RecordSetDetail']> {
    const set = await this.requireSet(id);
    const revisions = await this.parts.records.revisionsOf([id]);
    return toSetDetail(set, revisions, await this.contentsOf(requireNewest(revisions).id));
  }

  async readRevision(id: string): Promise<Schemas['RecordRevision']> {
    const revision = await this.requireRevision(id);
    return toRevisionAnswer(revision, await this.contentsOf(id));
  }

  /** The uploaded file, under the name that it came with. */
  async original(id: string): Promise<Omit<Download, 'type'>> {
    const revision = await this.requireRevision(id);
    const { originalPath, originalKept, fileName, byteCount, reading } = revision;
    requireRows(revision);
    if (!originalKept) {
      const columns = reading.setAside.length === 1 ? 'a column of it was' : 'columns of it were';
      throw new DeskError(
        'original-not-kept',
        `${fileName} was not kept, because ${columns} set aside before storing. Its SHA-256, name and size are; what was stored can be exported as CSV.`,
      );
    }
    const bytes = await this.parts.files.open(originalPath);
    if (!bytes)
      throw new DeskError(
        'not-found',
        `${fileName} is missing from the service’s disk, though it should be there. Tell whoever runs the service; what was stored can be exported as CSV.`,
      );
    return { bytes, fileName, byteCount };
  }

  /** A new record set from an uploaded form. */
  async createFromForm(personId: string, request: Request, signal: AbortSignal): Promise<Schemas['RecordSetDetail']> {
    const { file, fileName, fields } = await this.receive(request);
    return this.discardingOnFailure(file, () =>
      this.createSet(readWords(fields), { file, fileName, personId }, signal),
    );
  }

  /** A further revision of a set from an uploaded form. */
  async reviseFromForm(
    recordSetId: string,
    personId: string,
    request: Request,
    signal: AbortSignal,
  ): Promise<Schemas['RecordRevision']> {
    await this.requireSet(recordSetId);
    const { file, fileName } = await this.receive(request);
    return this.discardingOnFailure(file, async () => {
      const choices = await this.choicesCarriedTo(file, recordSetId, signal);
      return this.addRevision({ kind: 'revision', recordSetId }, { file, fileName, personId, choices }, signal);
    });
  }

  /** A new record set from a file on this machine, which is copied. */
  async importFile({ path, name, description, ...given }: FileToImport): Promise<Schemas['RecordSetDetail']> {
    const file = await this.parts.files.receiveCopy(path);
    const fileName = plainFileName(given.fileName);
    return this.discardingOnFailure(file, () => this.createSet({ name, description }, { ...given, file, fileName }));
  }

  /** A further revision of a set from a file on this machine, which is copied. */
  async importRevision(given: RevisionToImport): Promise<Schemas['RecordRevision']> {
    const { path, recordSetId, appendTo, personId, choices } = given;
    await this.requireSet(recordSetId);
    if (appendTo !== undefined && (await this.requireRevision(appendTo)).recordSetId !== recordSetId)
      throw notFound('revision of that record set');
    const file = await this.parts.files.receiveCopy(path);
    const fileName = plainFileName(given.fileName);
    const destination: Destination =
      appendTo === undefined ? { kind: 'revision', recordSetId } : { kind: 'appended', revisionId: appendTo };
    return this.discardingOnFailure(file, () => this.addRevision(destination, { file, fileName, personId, choices }));
  }

  /** What an analyst has set aside or taken as missing once does not come back because nobody looked. */
  private async choicesCarriedTo(
    { path }: ReceivedFile,
    recordSetId: string,
    signal: AbortSignal,
  ): Promise<ReadingChoices> {
    const { reading } = requireNewest(await this.parts.records.revisionsOf([recordSetId]));
    if (!hasChoices(reading)) return {};
    const { columns } = await this.parts.proposals.of(path, {}, { signal });
    return carriedChoices(reading, new Set(columns.map(({ name }) => name)));
  }

  private async contentsOf(id: string): Promise<RevisionContents> {
    const { records } = this.parts;
    return { columns: await records.columnsOf(id), mending: await records.mendingOf(id) };
  }

  private receive(request: Request): Promise<Upload> {
    return receiveUpload(request, this.parts.files, this.parts.maximumFileBytes);
  }

  private async createSet(
    words: SetWords,
    given: FileToFinish,
    signal?: AbortSignal,
  ): Promise<Schemas['RecordSetDetail']> {
    if (await this.parts.records.nameIsTaken(words.name)) throw nameTaken(words.name);
    const { recordSetId } = await this.finish({ kind: 'record-set', ...words }, given, signal);
    return this.readSet(recordSetId);
  }

  private async addRevision(
    destination: Destination,
    given: FileToFinish,
    signal?: AbortSignal,
  ): Promise<Schemas['RecordRevision']> {
    return this.readRevision((await this.finish(destination, given, signal)).id);
  }

  /** The same way in as a file that was looked at before, to its end. */
  private async finish(
    destination: Destination,
    { choices = {}, ...given }: FileToFinish,
    signal?: AbortSignal,
  ): Promise<RevisionRecord> {
    const work = await this.parts.bringingIn.workOf({ ...given, choices }, destination);
    return this.requireRevision(await this.parts.tasks.finish(work, signal));
  }

  private async discardingOnFailure<Result>(file: ReceivedFile, work: () => Promise<Result>): Promise<Result> {
    try {
      return await work();
    } catch (error) {
      await this.parts.files.remove(file.path);
      throw error;
    }
  }

  private async requireSet(id: string): Promise<RecordSetRecord> {
    const set = await this.parts.records.findSet(id);
    if (!set) throw notFound('record set');
    return set;
  }

  private async requireRevision(id: string): Promise<RevisionRecord> {
    const revision = await this.parts.records.findRevision(id);
    if (!revision) throw notFound('revision');
    return revision;
  }
}

function requireNewest(revisions: readonly RevisionRecord[]): RevisionRecord {
  if (!revisions[0]) throw new Error('A record set has no revision.');
  return revisions[0];
}
