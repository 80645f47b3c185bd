import type { Request } from 'express';
import type { components } from '../../../openapi/types/desk';
import { timeText, type Clock } from '../clock';
import { translateUnique } from '../database/constraint-errors';
import { newId } from '../database/new-id';
import { DeskError, notFound } from '../errors';
import type { Page } from '../http/page';
import type { Journal } from '../journal/journal';
import type { KeptFiles, ReceivedFile } from './kept-files';
import type { Import, RevisionImporter } from './revision-importer';
import { plainFileName, receiveUpload, type Upload } from './receive-upload';
import { toRevisionAnswer, toSetDetail, toSetSummary } from './record-answers';
import type { RecordSetRecord, RecordsStore, RevisionRecord } from './records-store';

type Schemas = components['schemas'];

export interface RecordsParts {
  readonly records: RecordsStore;
  readonly files: KeptFiles;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly maximumFileBytes: number;
  readonly importer: RevisionImporter;
}

export interface FileToImport {
  readonly path: string;
  readonly fileName: string;
  readonly name: string;
  readonly description: string;
  readonly personId: string;
}

export type RevisionToImport = Pick<FileToImport, 'path' | 'fileName' | 'personId'> & { readonly recordSetId: string };

interface SetWords {
  readonly name: string;
  readonly description: string;
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
    return toSetDetail(set, revisions, await this.parts.records.columnsOf(requireNewest(revisions).id));
  }

  async readRevision(id: string): Promise<Schemas['RecordRevision']> {
    const revision = await this.requireRevision(id);
    return toRevisionAnswer(revision, await this.parts.records.columnsOf(id));
  }

  /** Where the uploaded file lies, and the name that it came with. */
  async original(
    id: string,
  ): Promise<{ readonly path: string; readonly fileName: string; readonly byteCount: number }> {
    const { originalPath, fileName, byteCount } = await this.requireRevision(id);
    return { path: this.parts.files.pathOf(originalPath), fileName, byteCount };
  }

  /** A new record set from an uploaded form. */
  async createFromForm(personId: string, request: Request, signal: AbortSignal): Promise<Schemas['RecordSetDetail']> {
    const upload = await this.receive(request);
    return this.discardingOnFailure(upload.file, async () => {
      const words = readWords(upload.fields);
      return this.createSet(words, { ...upload, personId, signal });
    });
  }

  /** A further revision of a set from an uploaded form. */
  async reviseFromForm(
    recordSetId: string,
    personId: string,
    request: Request,
    signal: AbortSignal,
  ): Promise<Schemas['RecordRevision']> {
    const set = await this.requireSet(recordSetId);
    const upload = await this.receive(request);
    return this.discardingOnFailure(upload.file, () => this.addRevision(set, { ...upload, personId, signal }));
  }

  /** A new record set from a file on this machine, which is copied. */
  async importFile({ path, fileName, name, description, personId }: FileToImport): Promise<Schemas['RecordSetDetail']> {
    const file = await this.parts.files.receiveCopy(path);
    return this.discardingOnFailure(file, () =>
      this.createSet({ name, description }, { file, fileName: plainFileName(fileName), personId }),
    );
  }

  /** A further revision of a set from a file on this machine, which is copied. */
  async importRevision({
    path,
    fileName,
    recordSetId,
    personId,
  }: RevisionToImport): Promise<Schemas['RecordRevision']> {
    const set = await this.requireSet(recordSetId);
    const file = await this.parts.files.receiveCopy(path);
    return this.discardingOnFailure(file, () =>
      this.addRevision(set, { file, fileName: plainFileName(fileName), personId }),
    );
  }

  private receive(request: Request): Promise<Upload> {
    return receiveUpload(request, this.parts.files, this.parts.maximumFileBytes);
  }

  private async createSet(words: SetWords, given: Import): Promise<Schemas['RecordSetDetail']> {
    const { records, journal, clock } = this.parts;
    if (await records.nameIsTaken(words.name)) throw nameTaken(words.name);
    const id = newId();
    await this.parts.importer.bringIn(given, async (store) => {
      const now = timeText(clock);
      const set = { id, ...words, retainUntil: null, changedAt: now, createdAt: now, createdBy: given.personId };
      await translateUnique(
        () => records.insertSet(set),
        'record_sets.name_key',
        () => nameTaken(words.name),
      );
      const rowCount = await store(id, 1);
      const summary = `The record set ${words.name} was brought in from ${given.fileName}: ${rowCount} rows`;
      await journal.write({
        actorId: given.personId,
        action: 'record-set-created',
        subjectKind: 'record-set',
        subjectId: id,
        summary,
      });
    });
    return this.readSet(id);
  }

  private async addRevision(set: RecordSetRecord, given: Import): Promise<Schemas['RecordRevision']> {
    const { records, journal } = this.parts;
    const revisionId = await this.parts.importer.bringIn(given, async (store) => {
      const [newest] = await records.revisionsOf([set.id]);
      const number = (newest?.number ?? 0) + 1;
      const rowCount = await store(set.id, number);
      const summary = `Revision ${number} of ${set.name} was brought in from ${given.fileName}: ${rowCount} rows`;
      await journal.write({
        actorId: given.personId,
        action: 'record-revision-added',
        subjectKind: 'record-set',
        subjectId: set.id,
        summary,
      });
    });
    return this.readRevision(revisionId);
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

const nameTaken = (name: string): DeskError =>
  new DeskError(
    'name-taken',
    `A record set is called ${name} already. Choose another name, or bring the file in as its next revision.`,
    { errors: [{ pointer: '#/name', detail: 'is in use' }] },
  );

function readWords(fields: ReadonlyMap<string, string>): SetWords {
  const name = (fields.get('name') ?? '').trim();
  const description = (fields.get('description') ?? '').trim();
  const wrong = (pointer: string, detail: string): DeskError =>
    new DeskError('request-invalid', `Mend the form and send it again: ${pointer.slice(2)} ${detail}.`, {
      errors: [{ pointer, detail }],
    });
  if (name === '') throw wrong('#/name', 'is missing');
  if (name.length > 120) throw wrong('#/name', 'is longer than 120 characters');
  if (description.length > 2000) throw wrong('#/description', 'is longer than 2000 characters');
  return { name, description };
}
