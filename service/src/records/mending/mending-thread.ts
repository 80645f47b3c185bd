import { extname, join } from 'node:path';
import pLimit from 'p-limit';
import type { components } from '../../../../openapi/types/desk';
import { DeskError } from '../../errors';
import { answerOfThread, type ThreadWatch } from '../worker-answer';
import type { MendOutcome, MendTask, StepsDone, StepTrouble, TrialOutcome, TrialTask } from './mend-task';

export type Mended = Extract<MendOutcome, { kind: 'mended' }>;

export interface MendingThreadParts {
  readonly databasePath: string;
  /** Node's own arguments for the threads; none when compiled. */
  readonly threadArguments: readonly string[];
}

/** Compiled beside this file, or its TypeScript source where this file is one. */
const fileOf = (worker: string): string => join(__dirname, `${worker}${extname(__filename)}`);

/** Trials at the same time in one process; the others wait, so that memory stays bounded. */
const triedAtOnce = 1;

/** Applies steps in a thread of its own. A step that cannot be done is told with its place. */
export class MendingThread {
  private readonly trials = pLimit(triedAtOnce);

  constructor(private readonly parts: MendingThreadParts) {}

  async mend(task: Omit<MendTask, 'databasePath'>, watch: ThreadWatch<StepsDone>): Promise<Mended> {
    const { databasePath, threadArguments } = this.parts;
    const outcome = await answerOfThread<MendOutcome, StepsDone>(
      fileOf('mend-worker'),
      { ...task, databasePath },
      threadArguments,
      watch,
    );
    if (outcome.kind === 'problem') throw stepProblem(outcome);
    return outcome;
  }

  /** Writes nothing. */
  async tryOut(
    task: Omit<TrialTask, 'databasePath'>,
    signal?: AbortSignal,
  ): Promise<components['schemas']['MendingTrial']> {
    const { databasePath, threadArguments } = this.parts;
    const outcome = await this.trials(() =>
      answerOfThread<TrialOutcome>(fileOf('trial-worker'), { ...task, databasePath }, threadArguments, { signal }),
    );
    if (outcome.kind === 'problem') throw stepProblem(outcome);
    return outcome.trial;
  }
}

function stepProblem({ step, message }: StepTrouble): DeskError {
  const errors = [{ pointer: `#/steps/${step}`, detail: message }];
  return new DeskError('request-invalid', `Mend step ${step + 1} and send the steps again: ${message}`, { errors });
}
