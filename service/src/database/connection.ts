import { knex, type Knex } from 'knex';
import type BetterSqlite3 from 'better-sqlite3';
import { ImmediateSqliteClient } from './immediate-sqlite-client';

const snakeCase = (name: string): string => name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
const camelCase = (name: string): string => name.replace(/_([a-z0-9])/g, (_, letter: string) => letter.toUpperCase());

function camelCaseKeys(row: unknown): unknown {
  if (row === null || typeof row !== 'object' || Buffer.isBuffer(row)) return row;
  return Object.fromEntries(Object.entries(row).map(([key, value]) => [camelCase(key), value]));
}

/** Rows are camelCase in code and snake_case in tables. */
const caseMapping: Pick<Knex.Config, 'wrapIdentifier' | 'postProcessResponse'> = {
  wrapIdentifier: (value: string | undefined, original) =>
    value === undefined ? '' : value === '*' ? '*' : original(snakeCase(value)),
  postProcessResponse: (result: unknown) => (Array.isArray(result) ? result.map(camelCaseKeys) : camelCaseKeys(result)),
};

function setPragmas(connection: BetterSqlite3.Database): void {
  connection.pragma('journal_mode = WAL');
  connection.pragma('synchronous = FULL');
  connection.pragma('foreign_keys = ON');
  connection.pragma('busy_timeout = 10000');
  connection.pragma('temp_store = MEMORY');
  // What is removed is overwritten: levels and steps of erased records must not be readable in the file any more.
  connection.pragma('secure_delete = ON');
}

/** Opens the SQLite file (made if absent). One connection; a transaction takes the write lock when it begins. */
export function openDatabase(filename: string): Knex {
  return knex({
    client: ImmediateSqliteClient,
    connection: { filename },
    useNullAsDefault: true,
    // Else a statement's values, cells of records among them, would stand in the message of its error and be logged.
    compileSqlOnError: false,
    pool: {
      min: 1,
      max: 1,
      afterCreate: (connection: BetterSqlite3.Database, done: (error: Error | null, connection: unknown) => void) => {
        setPragmas(connection);
        done(null, connection);
      },
    },
    ...caseMapping,
  });
}
