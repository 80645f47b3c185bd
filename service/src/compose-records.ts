import { join } from 'node:path';
import type { Clock } from './clock';
import type { Config } from './config';
import type { Database } from './database/database';
import type { Journal } from './journal/journal';
import { FindingsService } from './records/findings/findings-service';
import { MendingService } from './records/mending/mending-service';
import { KeptFiles } from './records/kept-files';
import { RecordsService } from './records/records-service';
import { RecordsStore } from './records/records-store';
import { RevisionImporter } from './records/revision-importer';

export interface RecordsOptions {
  readonly config: Config;
  readonly database: Database;
  readonly databasePath: string;
  readonly journal: Journal;
  readonly clock: Clock;
  readonly maximumFileBytes: number;
  readonly threadArguments: readonly string[];
}

export interface ComposedRecords {
  readonly records: RecordsService;
  readonly recordFindings: FindingsService;
  readonly recordMending: MendingService;
  readonly keptFiles: KeptFiles;
}

/** Builds what brings records in and reads them. */
export function composeRecords(options: RecordsOptions): ComposedRecords {
  const { database, journal, clock, maximumFileBytes, threadArguments } = options;
  const store = new RecordsStore(database);
  const keptFiles = new KeptFiles(join(options.config.dataFolder, 'uploads'), maximumFileBytes);
  const importer = new RevisionImporter({ database, records: store, files: keptFiles, clock, threadArguments });
  const records = new RecordsService({ records: store, files: keptFiles, journal, clock, maximumFileBytes, importer });
  const recordFindings = new FindingsService({ records: store, databasePath: options.databasePath, threadArguments });
  const { databasePath } = options;
  const recordMending = new MendingService({
    database,
    databasePath,
    records: store,
    files: keptFiles,
    journal,
    clock,
    threadArguments,
  });
  return { records, recordFindings, recordMending, keptFiles };
}
