import BetterSqlite3 from 'better-sqlite3';

/** A thread's own connection, which can only read. */
export function openForReading(databasePath: string): BetterSqlite3.Database {
  const connection = new BetterSqlite3(databasePath, { readonly: true, fileMustExist: true });
  connection.pragma('busy_timeout = 10000');
  return connection;
}

/** Opens a connection that can only read for as long as the work takes. Synchronous. */
export function withReadingConnection<Result>(
  databasePath: string,
  work: (connection: BetterSqlite3.Database) => Result,
): Result {
  const connection = openForReading(databasePath);
  try {
    return work(connection);
  } finally {
    connection.close();
  }
}
