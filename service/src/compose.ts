import { join } from 'node:path';
import type { Knex } from 'knex';
import type { Logger } from 'pino';
import { systemClock, type Clock } from './clock';
import { composeEditions, type EditionsRoom } from './compose-editions';
import { composeFits } from './compose-fits';
import { composeKeeping, type KeepingRoom } from './compose-keeping';
import { composeRecords, type RecordsRoom } from './compose-records';
import type { Config } from './config';
import { openDatabase } from './database/connection';
import { Database } from './database/database';
import { DeskService } from './desk/desk-service';
import { DeskStore } from './desk/desk-store';
import { EditionsStore } from './editions/editions-store';
import { EstimatorsService } from './estimators/estimators-service';
import { EstimatorsStore } from './estimators/estimators-store';
import type { FitRunner } from './fits/fit-runner';
import type { FitsService } from './fits/fits-service';
import { loadContract, type Contract } from './http/contract';
import { Journal } from './journal/journal';
import { KeysService } from './keys/keys-service';
import { KeysStore } from './keys/keys-store';
import { eraseRetainedRecords } from './jobs/erase-retained-records';
import { Schedule } from './jobs/schedule';
import { sweepCells } from './jobs/sweep-cells';
import { sweepIncomingFiles } from './jobs/sweep-incoming-files';
import { sweepInvitations } from './jobs/sweep-invitations';
import { sweepSignInAttempts } from './jobs/sweep-sign-in-attempts';
import { sweepUploads } from './jobs/sweep-uploads';
import { JournalService } from './journal/journal-service';
import { JournalStore } from './journal/journal-store';
import { MailService, openTransport } from './mail/mail-service';
import { PartnersService } from './partners/partners-service';
import { PartnersStore } from './partners/partners-store';
import { SitesService } from './partners/sites-service';
import { SitesStore } from './partners/sites-store';
import { InvitationService } from './people/invitation-service';
import { InvitationsStore } from './people/invitations-store';
import { PeopleService } from './people/people-service';
import { PeopleStore } from './people/people-store';
import { SignInService } from './people/sign-in-service';
import { SignInThrottle } from './people/sign-in-throttle';
import { Settings } from './settings/settings';
import { SettingsService } from './settings/settings-service';

export interface ComposeOptions {
  readonly config: Config;
  readonly log: Logger;
  readonly clock?: Clock;
  /** In tests: an answer that does not fit the contract is an error. */
  readonly validateAnswers?: boolean;
  /** Node's own arguments for the thread of a fit; none when compiled. */
  readonly fitThreadArguments?: readonly string[];
  /** Largest file that is taken in, in bytes. */
  readonly maximumFileBytes?: number;
  /** How often ended sessions are swept out; 0 never. */
  readonly sessionCleanupMs?: number;
}

export interface Services extends EditionsRoom, RecordsRoom, KeepingRoom {
  readonly config: Config;
  readonly log: Logger;
  readonly clock: Clock;
  readonly knex: Knex;
  readonly database: Database;
  readonly deskContract: Contract;
  readonly partnerContract: Contract;
  readonly validateAnswers: boolean;
  readonly sessionCleanupMs: number;
  readonly journal: Journal;
  readonly settings: Settings;
  readonly people: PeopleStore;
  readonly signIns: SignInService;
  readonly mail: MailService;
  readonly peopleService: PeopleService;
  readonly estimators: EstimatorsService;
  readonly keys: KeysService;
  readonly fits: FitsService;
  readonly fitRunner: FitRunner;
  readonly partners: PartnersService;
  readonly sites: SitesService;
  readonly invitationService: InvitationService;
  readonly desk: DeskService;
  readonly journalService: JournalService;
  readonly settingsService: SettingsService;
  /** Recurring work; idle until started. */
  readonly schedule: Schedule;
  close(): Promise<void>;
}

/** What an upload may hold unless told otherwise: 2 GB. */
const ordinaryFileBytes = 2_000_000_000;

export const databasePathOf = (config: Config): string => join(config.dataFolder, 'tarebeam.sqlite');

/** Builds every service once: the only place that does. */
export function compose(options: ComposeOptions): Services {
  const { config, log, clock = systemClock, validateAnswers = false, sessionCleanupMs = 15 * 60 * 1000 } = options;
  const knex = openDatabase(databasePathOf(config));
  const database = new Database(knex);
  const journal = new Journal(database, clock);
  const people = new PeopleStore(database);
  const estimators = new EstimatorsStore(database);
  const editions = new EditionsStore(database);
  const settings = new Settings(database);
  const mail = new MailService(openTransport(config), settings, log);
  const invitations = new InvitationsStore(database);
  const throttle = new SignInThrottle(database, clock);
  const journalService = new JournalService(new JournalStore(database));
  const recordsRoom = composeRecords({
    ...{ database, journal, clock, config, log },
    databasePath: databasePathOf(config),
    maximumFileBytes: options.maximumFileBytes ?? ordinaryFileBytes,
    threadArguments: options.fitThreadArguments ?? [],
  });
  const partners = new PartnersStore(database);
  const sites = new SitesStore(database);
  const keys = new KeysService({ database, keys: new KeysStore(database), estimators, journal, clock });
  const { fits, fitRunner, fitsStore } = composeFits({
    ...{ database, estimators, editions, journal, clock, log },
    databasePath: databasePathOf(config),
    threadArguments: options.fitThreadArguments ?? [],
  });
  const keepingRoom = composeKeeping({
    ...{ database, journal, clock, log, fits, recordsRoom },
    databasePath: databasePathOf(config),
    threadArguments: options.fitThreadArguments ?? [],
  });
  const sweeps = [
    sweepInvitations(invitations, clock),
    sweepSignInAttempts(throttle),
    sweepUploads(recordsRoom.incomingSweep),
    sweepIncomingFiles(recordsRoom.incomingSweep, recordsRoom.recordTasks),
    sweepCells(recordsRoom.cellStorage, clock),
    eraseRetainedRecords(keepingRoom.retention),
  ];
  const schedule = new Schedule(sweeps, log);
  return {
    config,
    log,
    clock,
    knex,
    database,
    deskContract: loadContract('desk'),
    partnerContract: loadContract('partner'),
    validateAnswers,
    sessionCleanupMs,
    journal,
    settings,
    people,
    estimators: new EstimatorsService({ database, estimators, editions, journal, clock }),
    keys,
    fits,
    fitRunner,
    ...recordsRoom,
    ...keepingRoom,
    ...composeEditions({ database, editions, fits: fitsStore, estimators, journal, clock }),
    partners: new PartnersService({ database, partners, sites, keys, journal, clock }),
    sites: new SitesService({ database, partners, sites, journal, clock }),
    signIns: new SignInService(people, throttle, journal, clock),
    mail,
    peopleService: new PeopleService({ database, people, invitations, journal, clock }),
    invitationService: new InvitationService({
      database,
      people,
      invitations,
      journal,
      mail,
      settings,
      clock,
      publicUrl: config.publicUrl,
    }),
    desk: new DeskService({ desk: new DeskStore(database), editions, journal: journalService, settings, clock }),
    journalService,
    settingsService: new SettingsService(database, settings, journal),
    schedule,
    close: async () => {
      await schedule.stop();
      await fitRunner.close();
      await recordsRoom.recordTasks.close();
      mail.close();
      await database.close();
    },
  };
}
