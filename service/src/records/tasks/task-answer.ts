import type { components } from '../../../../openapi/types/desk';
import { DeskError } from '../../errors';
import type { TaskProblem, TaskRecord } from './record-tasks-store';

export type TaskAnswer = components['schemas']['RecordTask'];

export function toTaskAnswer(task: TaskRecord): TaskAnswer {
  const { id, kind, state, progress, recordSetId, revisionId, problem, createdAt, createdBy } = task;
  const done = state === 'done';
  return {
    ...{ id, kind, state, progress, problem, createdAt },
    recordSetId: done ? recordSetId : null,
    revisionId: done ? revisionId : null,
    createdBy: { ...createdBy },
  };
}

export function toTaskProblem(error: unknown): TaskProblem {
  if (!(error instanceof DeskError))
    return {
      code: 'internal',
      detail: 'The service failed at this. Nothing was kept; try again, and tell us if it comes back.',
    };
  const { code, detail, more } = error;
  return {
    ...{ code, detail },
    ...(more.line !== undefined && { line: more.line }),
    ...(more.errors && { errors: more.errors.map((one) => ({ ...one })) }),
  };
}

/** Why work is stopped before its end: what its caller is told, and how the task ends. */
export class TaskStop extends DeskError {
  constructor(
    readonly state: 'cancelled' | 'failed',
    ...problem: ConstructorParameters<typeof DeskError>
  ) {
    super(...problem);
  }
}

export const cancelledByPerson = (): TaskStop =>
  new TaskStop('cancelled', 'task-ended', 'The work was cancelled before its end. Nothing was kept.');

export const callerGone = (): TaskStop =>
  new TaskStop('cancelled', 'body-unreadable', 'The call was broken off before the work ended. Nothing was kept.');

export const serviceStopped = (): TaskStop =>
  new TaskStop(
    'failed',
    'unavailable',
    'The service was stopped while it was at this. Nothing was kept of it; start it again.',
  );
