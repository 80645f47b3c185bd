import type { Retention } from '../records/keeping/retention';
import type { Job } from './job';

/** Erases the rows of record sets whose retention date has passed. */
export function eraseRetainedRecords(retention: Retention): Job {
  return { name: 'erase-retained-records', everyMs: 24 * 60 * 60 * 1000, run: () => retention.eraseDue() };
}
