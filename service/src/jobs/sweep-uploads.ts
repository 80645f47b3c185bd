import type { IncomingSweep } from '../records/incoming/incoming-sweep';
import type { Job } from './job';

/** Removes what was left of uploads when a process was killed. */
export function sweepUploads(incoming: IncomingSweep): Job {
  return { name: 'sweep-uploads', everyMs: 24 * 60 * 60 * 1000, run: () => incoming.removeLeftBehind() };
}
