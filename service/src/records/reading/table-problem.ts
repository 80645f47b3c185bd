import type { ProblemCode } from '../../errors';

export type TableProblemCode = Extract<ProblemCode, `file-${string}` | 'choices-invalid'>;

/** What is wrong with a file. Crosses from the reading thread as plain data. Never carries cells, which stay out of logs. */
export class TableProblem extends Error {
  constructor(
    readonly code: TableProblemCode,
    readonly detail: string,
    readonly line?: number,
  ) {
    super(detail);
    this.name = 'TableProblem';
  }
}
