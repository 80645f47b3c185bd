import type { TableReading } from './reading/read-table';
import type { TableProblemCode } from './reading/table-problem';

/** What the reading thread is told. */
export interface ImportTask {
  readonly path: string;
  readonly spillPath: string;
}

/** What it says at its end. */
export type ImportOutcome =
  | { readonly kind: 'read'; readonly reading: TableReading }
  | { readonly kind: 'problem'; readonly code: TableProblemCode; readonly detail: string; readonly line?: number };
