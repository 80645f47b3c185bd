import { DeskError } from '../errors';
import type { RevisionRecord } from './records-store';

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
