import type { IncomingSweep } from '../records/incoming/incoming-sweep';
import type { RecordTasks } from '../records/tasks/record-tasks';
import type { Job } from './job';

/** Removes files that were sent and not brought in within their time, and tasks that nobody looks at any more. */
export function sweepIncomingFiles(incoming: IncomingSweep, tasks: RecordTasks): Job {
  return {
    name: 'sweep-incoming-files',
    everyMs: 60 * 60 * 1000,
    run: async () => {
      await incoming.removeOld();
      await tasks.sweep();
    },
  };
}
