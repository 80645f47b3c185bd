import type { Knex } from 'knex';

interface TransactionInstance {
  query(connection: unknown, sql: string): Promise<unknown>;
  begin(connection: unknown): Promise<unknown>;
}
type TransactionConstructor = new (...args: readonly unknown[]) => TransactionInstance;
interface SqliteClient {
  transaction(...args: readonly unknown[]): TransactionInstance;
}
type SqliteClientConstructor = new (...args: readonly unknown[]) => SqliteClient;

// Knex has no setting for the kind of BEGIN, so its two classes are extended here.
// eslint-disable-next-line @typescript-eslint/no-require-imports -- knex publishes no types for these inner modules
const BetterSqlite3Client = require('knex/lib/dialects/better-sqlite3') as SqliteClientConstructor;
// eslint-disable-next-line @typescript-eslint/no-require-imports -- as above
const SqliteTransaction = require('knex/lib/dialects/sqlite3/execution/sqlite-transaction') as TransactionConstructor;

/**
 * `BEGIN IMMEDIATE`: a transaction that reads and then writes would otherwise fail at once with SQLITE_BUSY when
 * another process wrote in between, without waiting for the busy timeout.
 */
class ImmediateTransaction extends SqliteTransaction {
  override begin(connection: unknown): Promise<unknown> {
    return this.query(connection, 'BEGIN IMMEDIATE;');
  }
}

class ImmediateClient extends BetterSqlite3Client {
  override transaction(...args: readonly unknown[]): TransactionInstance {
    return new ImmediateTransaction(this, ...args);
  }
}

export const ImmediateSqliteClient = ImmediateClient as unknown as typeof Knex.Client;
