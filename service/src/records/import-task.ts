import type { BaseColumn, ReadingChoices, ReadingProgress } from './reading/reading-choices';
import type { AheadOfReading } from './storing/storing-companion';
import type { TableProblemCode } from './reading/table-problem';

/** What the thread that finds out how a file would be read is told. */
export interface ProposalTask {
  readonly path: string;
  readonly choices?: ReadingChoices;
  /** Columns of the revision that the file is appended to. */
  readonly base?: readonly BaseColumn[];
}

/** What the reading thread is told. */
export interface ImportTask extends ProposalTask {
  readonly spillPath: string;
  /** Where cells may be stored while the file is still being read; without it none are. */
  readonly ahead?: AheadOfReading;
}

/** What a thread that reads a file says; all but progress is its last word. */
export type TableMessage<Answer> =
  | { readonly kind: 'progress'; readonly progress: ReadingProgress }
  | { readonly kind: 'answer'; readonly answer: Answer }
  | { readonly kind: 'problem'; readonly code: TableProblemCode; readonly detail: string; readonly line?: number };
