import { DeskError, notFound } from '../errors';
import type { RecordsStore, RevisionRecord } from './records-store';

/**
 * The set's newest revision. Refuses when the caller knew another one as the newest, so that nobody works past what a
 * colleague has added. Ask before the work, to spare it, and again inside the unit of work, where it counts.
 */
export async function requireExpectedNewest(
  records: Pick<RecordsStore, 'revisionsOf'>,
  recordSetId: string,
  expectedNewest: number | undefined,
): Promise<RevisionRecord> {
  const [newest] = await records.revisionsOf([recordSetId]);
  if (!newest) throw notFound('record set');
  if (expectedNewest === undefined || newest.number === expectedNewest) return newest;
  throw new DeskError('record-set-changed', wordsOf(newest, expectedNewest));
}

function wordsOf(newest: RevisionRecord, expected: number): string {
  if (newest.number < expected)
    return `Revision ${expected} has been deleted since you read the record set; revision ${newest.number} is the newest now. Read the record set again, then decide whether what you send is still wanted.`;
  // 2026-11-03T09:00:00.000Z as 2026-11-03 09:00
  const when = newest.createdAt.slice(0, 16).replace('T', ' ');
  return `${newest.createdBy.name} added revision ${newest.number} to ${newest.recordSetName} at ${when} UTC, after you had read revision ${expected}. Look at revision ${newest.number} first; if yours is still wanted, send it again.`;
}
