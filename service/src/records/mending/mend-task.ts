import type { MendStep } from './apply-steps';
import type { FinishedTable } from './finish-table';

/** What the mending thread is told. */
export interface MendTask {
  readonly databasePath: string;
  readonly revisionId: string;
  readonly steps: readonly MendStep[];
  readonly spillPath: string;
}

/** What it says at its end. */
export type MendOutcome =
  | { readonly kind: 'mended'; readonly table: FinishedTable; readonly changes: readonly string[] }
  | { readonly kind: 'problem'; readonly step: number; readonly message: string };
