import type { Finding } from './finding';

/** What the searching thread is told. */
export interface FindingsTask {
  readonly databasePath: string;
  readonly revisionId: string;
  readonly target: string | null;
}

export type FindingsOutcome = readonly Finding[];
