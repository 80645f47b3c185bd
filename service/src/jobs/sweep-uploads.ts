import type { KeptFiles } from '../records/kept-files';
import type { Job } from './job';

/** Removes what was left of uploads when a process was killed. File times are the machine's own, so its clock counts. */
export function sweepUploads(files: KeptFiles): Job {
  return { name: 'sweep-uploads', everyMs: 24 * 60 * 60 * 1000, run: () => files.sweep(new Date()) };
}
