import type { Logger } from 'pino';
import type { Clock } from './clock';
import type { RecordsRoom } from './compose-records';
import type { Database } from './database/database';
import type { FitsService } from './fits/fits-service';
import type { Journal } from './journal/journal';
import { JournalStore } from './journal/journal-store';
import { KeepingStore } from './records/keeping/keeping-store';
import { Retention } from './records/keeping/retention';
import { RevisionDeletions } from './records/keeping/revision-deletions';
import { RevisionExports } from './records/keeping/revision-exports';
import { SetChanges } from './records/keeping/set-changes';
import { RecordsStore } from './records/records-store';

export interface KeepingOptions {
  readonly database: Database;
  readonly databasePath: string;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly log: Logger;
  readonly threadArguments: readonly string[];
  readonly fits: FitsService;
  readonly recordsRoom: Pick<RecordsRoom, 'keptFiles' | 'cellStorage'>;
}

/** What changes record sets, lets revisions go when nothing rests on them, erases and exports. */
export interface KeepingRoom {
  readonly setChanges: SetChanges;
  readonly revisionDeletions: RevisionDeletions;
  readonly revisionExports: RevisionExports;
  readonly retention: Retention;
}

/** Composed after the fits, since a revision that goes stops the fits that are computed from it. */
export function composeKeeping(options: KeepingOptions): KeepingRoom {
  const { database, databasePath, journal, clock, log, threadArguments, fits, recordsRoom } = options;
  const records = new RecordsStore(database);
  const keeping = new KeepingStore(database);
  const kept = { database, records, keeping, files: recordsRoom.keptFiles, cells: recordsRoom.cellStorage };
  return {
    setChanges: new SetChanges({ database, records, keeping, entries: new JournalStore(database), journal, clock }),
    revisionDeletions: new RevisionDeletions({ ...kept, fits, journal, clock, log }),
    revisionExports: new RevisionExports({ records, databasePath, threadArguments }),
    retention: new Retention({ ...kept, journal, clock }),
  };
}
