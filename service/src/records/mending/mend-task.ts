import type { components } from '../../../../openapi/types/desk';
import type { FinishedTable } from './finish-table';
import type { Effect, MendStep } from './step-change';

/** What the thread that tries steps is told. */
export interface TrialTask {
  readonly databasePath: string;
  readonly revisionId: string;
  readonly steps: readonly MendStep[];
}

/** What the mending thread is told. */
export interface MendTask extends TrialTask {
  readonly spillPath: string;
}

export interface StepTrouble {
  readonly kind: 'problem';
  /** Counted from 0. */
  readonly step: number;
  readonly message: string;
}

/** What each says at its end. */
export type MendOutcome =
  { readonly kind: 'mended'; readonly table: FinishedTable; readonly effects: readonly Effect[] } | StepTrouble;
export type TrialOutcome =
  { readonly kind: 'tried'; readonly trial: components['schemas']['MendingTrial'] } | StepTrouble;

/** What both say on the way: steps done. */
export type StepsDone = number;
