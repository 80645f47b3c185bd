import type { AddedTable } from './append-table';

/** What the appending thread is told. */
export interface AppendTask {
  readonly databasePath: string;
  readonly baseRevisionId: string;
  readonly added: AddedTable;
  readonly addedSpillPath: string;
  /** Made by the thread; must not be there yet. */
  readonly spillPath: string;
}
