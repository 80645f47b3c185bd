import type { Logger } from 'pino';
import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import type { Database } from '../../database/database';
import { DeskError, notFound } from '../../errors';
import type { Journal } from '../../journal/journal';
import type { SignedInPerson } from '../../people/person';
import { rowsText } from '../findings/finding';
import type { KeptFiles } from '../kept-files';
import type { RecordsStore, RevisionRecord } from '../records-store';
import type { CellStorage } from '../storing/cell-storage';
import type { KeepingStore } from './keeping-store';

type Outlook = components['schemas']['RevisionDeletion'];

/** What is needed of the fits: they cannot be imported here, since they import records. */
export interface StoppableFits {
  cancel(person: SignedInPerson, id: string): Promise<unknown>;
  follow(id: string, follower: { readonly step: () => void; readonly end: () => void }): () => void;
}

export interface RevisionDeletionsParts {
  readonly database: Database;
  readonly records: RecordsStore;
  readonly keeping: KeepingStore;
  readonly files: KeptFiles;
  readonly cells: Pick<CellStorage, 'clear'>;
  readonly fits: StoppableFits;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly log: Logger;
}

/** A fit of another process hears of its cancelling within two seconds. One that has not by now has died. */
const patienceMs = 10_000;

/** Deletes revisions that no edition rests on, and says beforehand what would go along. */
export class RevisionDeletions {
  constructor(private readonly parts: RevisionDeletionsParts) {}

  async outlook(id: string): Promise<Outlook> {
    const { records, keeping } = this.parts;
    const revision = await this.require(id);
    const { number, rowCount, byteCount, originalPath, originalKept } = revision;
    const fits = await keeping.fitsOn(id);
    return {
      ...{ revisionNumber: number, rowCount, byteCount },
      editions: await keeping.editionsOn(id),
      fits: fits.map(({ id: fitId, estimatorSlug, estimatorName }) => ({ id: fitId, estimatorSlug, estimatorName })),
      goesWithSet: (await records.revisionsOf([revision.recordSetId])).length === 1,
      originalGoes: originalKept && !(await keeping.originalIsShared(originalPath, id)),
      basedOnIt: await keeping.numbersBasedOn(id),
    };
  }

  /**
   * One unit of work; cells and file go after it, so that a crash in between leaves nothing but cells and a file that
   * nobody speaks of, which are swept.
   */
  async remove(person: SignedInPerson, id: string): Promise<void> {
    const { database, cells, files, keeping, log } = this.parts;
    requireUnused(await this.require(id), await keeping.editionsOn(id));
    await this.stopFits(person, id);
    const { revision, outlook } = await database.unitOfWork(() => this.removeRow(person, id));
    try {
      if (outlook.originalGoes) await files.remove(files.pathOf(revision.originalPath));
      await cells.clear(id);
    } catch (error) {
      log.error({ err: error, revisionId: id }, 'what a deleted revision left could not be removed; it will be swept');
    }
  }

  /** Asked again inside the unit of work: an edition may have been drawn up while fits were being stopped. */
  private async removeRow(
    person: SignedInPerson,
    id: string,
  ): Promise<{ readonly revision: RevisionRecord; readonly outlook: Outlook }> {
    const { records, keeping, journal, clock } = this.parts;
    const revision = await this.require(id);
    const outlook = await this.outlook(id);
    requireUnused(revision, outlook.editions);
    await keeping.removeRevision(id);
    if (outlook.goesWithSet) await keeping.removeSet(revision.recordSetId);
    else await records.markSetChanged(revision.recordSetId, timeText(clock));
    await journal.write({
      actorId: person.id,
      action: 'record-revision-deleted',
      subjectKind: 'record-set',
      subjectId: revision.recordSetId,
      summary: `Revision ${revision.number} of ${revision.recordSetName} was deleted with ${goneText(outlook)}`,
    });
    return { revision, outlook };
  }

  private async stopFits(person: SignedInPerson, revisionId: string): Promise<void> {
    const active = (await this.parts.keeping.fitsOn(revisionId)).filter(
      ({ state }) => state === 'queued' || state === 'running',
    );
    for (const { id } of active) await this.stopFit(person, id);
  }

  private async stopFit(person: SignedInPerson, id: string): Promise<void> {
    const { fits } = this.parts;
    try {
      await fits.cancel(person, id);
    } catch (error) {
      // It ended by itself in the meantime.
      if (error instanceof DeskError && (error.code === 'fit-ended' || error.code === 'not-found')) return;
      throw error;
    }
    await this.endOf(id);
  }

  private async endOf(fitId: string): Promise<void> {
    await new Promise<void>((resolve) => {
      const unfollow = this.parts.fits.follow(fitId, { step: () => undefined, end: () => stop() });
      const timer = setTimeout(() => stop(), patienceMs);
      const stop = (): void => {
        clearTimeout(timer);
        unfollow();
        resolve();
      };
    });
  }

  private async require(id: string): Promise<RevisionRecord> {
    const revision = await this.parts.records.findRevision(id);
    if (!revision) throw notFound('revision');
    return revision;
  }
}

function requireUnused({ number, recordSetName }: RevisionRecord, editions: Outlook['editions']): void {
  if (editions.length === 0) return;
  const named = editions.map((edition) => `edition ${edition.number} of ${edition.estimatorName}`).join(', ');
  throw new DeskError(
    'revision-in-use',
    `Revision ${number} of ${recordSetName} cannot be deleted, because ${named} rest${editions.length === 1 ? 's' : ''} on it. An edition’s records are kept so that its numbers can be accounted for; set a retention date if the rows must go.`,
  );
}

function goneText({ rowCount, fits, originalGoes, goesWithSet }: Outlook): string {
  const gone = [rowsText(rowCount)];
  if (fits.length > 0) gone.push(fits.length === 1 ? '1 fit' : `${fits.length} fits`);
  if (originalGoes) gone.push('its original file');
  return `${gone.join(', ')}${goesWithSet ? '; it was the only one, so the record set went too' : ''}`;
}
