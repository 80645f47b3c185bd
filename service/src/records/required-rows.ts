import { DeskError, notFound } from '../errors';
import type { RecordsStore, RevisionRecord } from './records-store';

/**
 * Refuses a revision whose rows are gone. Whatever reads cells, or what was taken from cells, calls this first; the
 * revision's number, SHA-256 and columns' names are answered all the same.
 */
export function requireRows({
  number,
  recordSetName,
  erasedAt,
}: Pick<RevisionRecord, 'number' | 'recordSetName' | 'erasedAt'>): void {
  if (erasedAt === null) return;
  throw new DeskError(
    'records-erased',
    `The rows of revision ${number} of ${recordSetName} were erased on ${erasedAt.slice(0, 10)}, because the record set’s retention date had passed. Bring the records in again if you still may keep them.`,
  );
}

type Revisions = Pick<RecordsStore, 'findRevision'>;

/** The revision, when it is there with its rows. */
export async function revisionWithRows(records: Revisions, id: string): Promise<RevisionRecord> {
  const revision = await records.findRevision(id);
  if (!revision) throw notFound('revision');
  requireRows(revision);
  return revision;
}

/**
 * Does what needs the rows of these revisions. A thread that lost them on the way, because they were erased or deleted
 * meanwhile, fails in its own words; whoever asked is told what became of them.
 */
export async function withRowsOf<Result>(
  records: Revisions,
  ids: readonly string[],
  work: () => Promise<Result>,
): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    if (!(error instanceof DeskError)) for (const id of ids) await revisionWithRows(records, id);
    throw error;
  }
}
