import { join } from 'node:path';
import type { Logger } from 'pino';
import type { Clock } from './clock';
import type { Config } from './config';
import type { Database } from './database/database';
import type { Journal } from './journal/journal';
import { FindingsService } from './records/findings/findings-service';
import { LookingService } from './records/looking/looking-service';
import { MendingDrafts } from './records/mending/mending-drafts';
import { MendingDraftsStore } from './records/mending/mending-drafts-store';
import { MendingService } from './records/mending/mending-service';
import { MendingThread } from './records/mending/mending-thread';
import { CellStorage } from './records/storing/cell-storage';
import { BringingIn } from './records/incoming/bringing-in';
import { IncomingFilesStore } from './records/incoming/incoming-files-store';
import { IncomingFilesService } from './records/incoming/incoming-files-service';
import { IncomingSweep } from './records/incoming/incoming-sweep';
import { ReadingProposals } from './records/incoming/reading-proposals';
import { KeptFiles } from './records/kept-files';
import { RecordsService } from './records/records-service';
import { RecordsStore } from './records/records-store';
import { RevisionImporter } from './records/revision-importer';
import { RecordTasks } from './records/tasks/record-tasks';
import { RecordTasksStore } from './records/tasks/record-tasks-store';

export interface RecordsOptions {
  readonly config: Config;
  readonly database: Database;
  readonly databasePath: string;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly log: Logger;
  readonly maximumFileBytes: number;
  readonly threadArguments: readonly string[];
}

/** What brings records in, looks at them, mends them and lets them go. */
export interface RecordsRoom {
  readonly records: RecordsService;
  readonly recordFindings: FindingsService;
  readonly recordLooking: LookingService;
  readonly recordMending: MendingService;
  readonly mendingDrafts: MendingDrafts;
  readonly recordTasks: RecordTasks;
  readonly incomingFiles: IncomingFilesService;
  readonly incomingSweep: IncomingSweep;
  readonly keptFiles: KeptFiles;
  readonly cellStorage: CellStorage;
}

export function composeRecords(options: RecordsOptions): RecordsRoom {
  const { database, databasePath, journal, clock, log, maximumFileBytes, threadArguments } = options;
  const store = new RecordsStore(database);
  const keptFiles = new KeptFiles(join(options.config.dataFolder, 'uploads'), maximumFileBytes);
  const cells = new CellStorage({ databasePath, threadArguments, log });
  const recordTasks = new RecordTasks({ tasks: new RecordTasksStore(database), clock, log });
  const importer = new RevisionImporter({
    ...{ database, records: store, files: keptFiles, cells, clock, databasePath, threadArguments },
  });
  const bringingIn = new BringingIn({ records: store, importer, journal, clock });
  const proposals = new ReadingProposals({ records: store, threadArguments });
  const records = new RecordsService({
    ...{ records: store, files: keptFiles, bringingIn, tasks: recordTasks, proposals, maximumFileBytes },
  });
  const recordFindings = new FindingsService({ records: store, databasePath, threadArguments });
  const recordLooking = new LookingService({ records: store, databasePath, threadArguments });
  const drafts = new MendingDraftsStore(database);
  const recordMending = new MendingService({
    ...{ database, records: store, files: keptFiles, cells, drafts, journal, clock, tasks: recordTasks },
    thread: new MendingThread({ databasePath, threadArguments }),
  });
  const mendingDrafts = new MendingDrafts({ database, records: store, drafts, clock });
  const incoming = new IncomingFilesStore(database);
  const incomingFiles = new IncomingFilesService({
    ...{ incoming, files: keptFiles, proposals, bringingIn, tasks: recordTasks, clock, maximumFileBytes },
  });
  return {
    records,
    recordFindings,
    recordLooking,
    recordMending,
    mendingDrafts,
    recordTasks,
    incomingFiles,
    incomingSweep: new IncomingSweep({ incoming, files: keptFiles, clock }),
    keptFiles,
    cellStorage: cells,
  };
}
