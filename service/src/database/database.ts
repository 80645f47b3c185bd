import { AsyncLocalStorage } from 'node:async_hooks';
import type { Knex } from 'knex';

/**
 * What stores are given. Inside a unit of work every query of the same asynchronous call chain joins its
 * transaction, so that none can wait in vain for the single SQLite connection.
 */
export class Database {
  private readonly transactions = new AsyncLocalStorage<Knex.Transaction>();

  constructor(private readonly knex: Knex) {}

  /** A query on one table. */
  table<Row extends object>(name: string): Knex.QueryBuilder<Row, Row[]> {
    return this.connection<Row>(name) as unknown as Knex.QueryBuilder<Row, Row[]>;
  }

  get connection(): Knex {
    return this.transactions.getStore() ?? this.knex;
  }

  /** Runs `work` in one transaction: all of it is kept or none. A unit inside a unit joins the outer one. */
  async unitOfWork<Result>(work: () => Promise<Result>): Promise<Result> {
    if (this.transactions.getStore() !== undefined) return work();
    return this.knex.transaction((transaction) => this.transactions.run(transaction, work));
  }

  async close(): Promise<void> {
    await this.knex.destroy();
  }
}
