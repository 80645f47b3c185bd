import { existsSync, mkdirSync, readdirSync, renameSync, rmSync, statSync } from 'node:fs';
import { basename, join } from 'node:path';
import type { Logger } from 'pino';
import { databasePathOf } from '../compose';
import type { Config } from '../config';
import { openDatabase } from '../database/connection';
import { readNote, writeNote, type DemonstrationNote } from './note';
import { play } from './play';

export interface DemonstrationOptions {
  readonly config: Config;
  readonly log: Logger;
  readonly now: Date;
  /** One line at a time, for whoever waits. */
  readonly tell: (line: string) => void;
  /** Node's own arguments for the threads of fits; none when compiled. */
  readonly threadArguments?: readonly string[];
}

/** True while nobody is entered: no file, or one that was opened and never used. */
async function isEmpty(databasePath: string): Promise<boolean> {
  if (!existsSync(databasePath)) return true;
  const knex = openDatabase(databasePath);
  try {
    return !(await knex.schema.hasTable('people')) || (await knex('people').first('id')) === undefined;
  } finally {
    await knex.destroy();
  }
}

/** A folder is filled up, a file replaced. */
function moveInto(from: string, to: string): void {
  if (!statSync(from).isDirectory()) {
    renameSync(from, to);
    return;
  }
  mkdirSync(to, { recursive: true });
  for (const entry of readdirSync(from)) moveInto(join(from, entry), join(to, entry));
}

/** The database takes its place last: until then the next start finds it empty and begins anew. */
function moveIntoPlace(draftFolder: string, config: Config): void {
  const database = basename(databasePathOf(config));
  for (const entry of readdirSync(draftFolder).filter((name) => !name.startsWith(database))) {
    moveInto(join(draftFolder, entry), join(config.dataFolder, entry));
  }
  for (const old of ['', '-wal', '-shm']) rmSync(`${databasePathOf(config)}${old}`, { force: true });
  renameSync(join(draftFolder, database), databasePathOf(config));
  rmSync(draftFolder, { recursive: true });
}

/**
 * Fills an empty data folder with the demonstration, once. Played into a folder of its own and moved into place when
 * complete, so that a crash on the way leaves nothing half done. Null when the database holds somebody's own work.
 */
export async function ensureDemonstration(options: DemonstrationOptions): Promise<DemonstrationNote | null> {
  const { config, tell } = options;
  if (!(await isEmpty(databasePathOf(config)))) return readNote(config.dataFolder);
  const draftFolder = join(config.dataFolder, 'demonstration-draft');
  rmSync(draftFolder, { recursive: true, force: true });
  mkdirSync(draftFolder, { recursive: true });
  tell('Filling the demonstration (once, about half a minute)');
  const started = Date.now();
  const note = await play(options, draftFolder);
  writeNote(draftFolder, note);
  moveIntoPlace(draftFolder, config);
  tell(`The demonstration is ready after ${Math.round((Date.now() - started) / 1000)} s`);
  return note;
}
