import pLimit from 'p-limit';
import type { Logger } from 'pino';
import type { components } from '../../../../openapi/types/desk';
import { timeText, type Clock } from '../../clock';
import { newId } from '../../database/new-id';
import { DeskError, notFound } from '../../errors';
import type { RecordTasksStore, TaskEnd, TaskKind, TaskProblem, TaskProgress, TaskRecord } from './record-tasks-store';

type TaskAnswer = components['schemas']['RecordTask'];

/** What a piece of work is given while it runs. */
export interface TaskContext {
  /** The id that the revision must get: what is stored of it ahead is cleared away by this id when the work fails. */
  readonly revisionId: string;
  /** Aborted when the work is cancelled. */
  readonly signal: AbortSignal;
  readonly progress: (progress: TaskProgress) => void;
}

export interface TaskWork {
  readonly kind: TaskKind;
  readonly personId: string;
  /** Does the work wholly or not at all; answers with the set that the new revision belongs to. */
  run(context: TaskContext): Promise<{ readonly recordSetId: string }>;
}

export interface RecordTasksParts {
  readonly tasks: RecordTasksStore;
  readonly clock: Clock;
  readonly log: Logger;
}

/** Revisions made at the same time in one process; the others wait, so that memory stays bounded. */
const madeAtOnce = 1;
const sayEveryMs = 400;
/** A task of another process that has said nothing for so long has died with it. */
const silentMs = 60_000;
/** Ended tasks are kept as long as somebody may still look at them. */
const keptMs = 7 * 24 * 60 * 60 * 1000;

const waiting: TaskProgress = { stage: 'waiting', done: 0, total: 0 };

/** Runs what makes revisions one after another, lets it be followed from any process, and cancelled. */
export class RecordTasks {
  private readonly queue = pLimit(madeAtOnce);
  private readonly running = new Map<string, AbortController>();
  private readonly endings = new Set<Promise<unknown>>();

  constructor(private readonly parts: RecordTasksParts) {}

  /** Begins the work and answers at once. */
  async start(work: TaskWork): Promise<TaskAnswer> {
    const { task, end } = await this.begin(work);
    end.catch(() => undefined);
    return this.read(task.id);
  }

  /** Does the work and answers with the revision's id, or throws what went wrong. `signal` cancels it. */
  async finish(work: TaskWork, signal?: AbortSignal): Promise<string> {
    const { task, end } = await this.begin(work, signal);
    await end;
    return task.revisionId;
  }

  async read(id: string): Promise<TaskAnswer> {
    const task = await this.parts.tasks.find(id);
    if (!task) throw notFound('task');
    return toAnswer(this.isLost(task) ? { ...task, state: 'failed', problem: lost } : task);
  }

  async cancel(id: string): Promise<TaskAnswer> {
    if (!(await this.parts.tasks.find(id))) throw notFound('task');
    if (!(await this.parts.tasks.askToCancel(id)))
      throw new DeskError('task-ended', 'The work has ended; there is nothing left to cancel.');
    this.running.get(id)?.abort();
    return this.read(id);
  }

  /** Cancels what runs here and waits until it has cleared up. */
  async close(): Promise<void> {
    for (const controller of this.running.values()) controller.abort();
    await Promise.allSettled([...this.endings]);
  }

  async sweep(): Promise<void> {
    await this.parts.tasks.removeBefore(new Date(this.parts.clock.now().getTime() - keptMs).toISOString());
  }

  private async begin(work: TaskWork, signal?: AbortSignal) {
    const now = timeText(this.parts.clock);
    const task = { id: newId(), kind: work.kind, state: 'queued', progress: waiting, revisionId: newId() } as const;
    await this.parts.tasks.insert({ ...task, saidAt: now, createdAt: now, createdBy: work.personId });
    const controller = new AbortController();
    const abort = (): void => controller.abort();
    signal?.addEventListener('abort', abort, { once: true });
    if (signal?.aborted) abort();
    this.running.set(task.id, controller);
    const end = this.queue(() => this.carryOut(task, work, controller)).finally(() => {
      this.running.delete(task.id);
      this.endings.delete(end);
      signal?.removeEventListener('abort', abort);
    });
    this.endings.add(end);
    return { task, end };
  }

  private async carryOut(
    task: { readonly id: string; readonly revisionId: string },
    work: TaskWork,
    controller: AbortController,
  ): Promise<void> {
    const { signal } = controller;
    let progress = waiting;
    const say = async (): Promise<void> => {
      if (await this.parts.tasks.say(task.id, 'running', progress, timeText(this.parts.clock))) controller.abort();
    };
    const quietly = (): void =>
      void say().catch((error: unknown) => this.parts.log.warn({ err: error, task: task.id }, 'progress was not kept'));
    await say();
    const timer = setInterval(quietly, sayEveryMs).unref();
    try {
      if (signal.aborted) throw cancelled();
      const { revisionId } = task;
      const { recordSetId } = await work.run({ revisionId, signal, progress: (step) => void (progress = step) });
      clearInterval(timer);
      await this.parts.tasks.say(task.id, 'running', progress, timeText(this.parts.clock));
      await this.parts.tasks.end(task.id, { state: 'done', recordSetId, problem: null });
    } catch (error) {
      clearInterval(timer);
      const end = signal.aborted
        ? { state: 'cancelled' as const, recordSetId: null, problem: null }
        : this.failure(error);
      await this.parts.tasks.end(task.id, end);
      throw signal.aborted ? cancelled(error) : error;
    }
  }

  private failure(error: unknown): TaskEnd {
    if (!(error instanceof DeskError)) this.parts.log.error({ err: error }, 'work on records failed');
    return { state: 'failed', recordSetId: null, problem: problemOf(error) };
  }

  private isLost({ id, state, saidAt }: TaskRecord): boolean {
    if ((state !== 'queued' && state !== 'running') || this.running.has(id)) return false;
    return this.parts.clock.now().getTime() - Date.parse(saidAt) > silentMs;
  }
}

const lost: TaskProblem = {
  code: 'unavailable',
  detail: 'The service was stopped while it was at this. Nothing was kept of it; start it again.',
};

const cancelled = (cause?: unknown): DeskError =>
  new DeskError('body-unreadable', 'The work was cancelled before its end. Nothing was kept.', { cause });

function problemOf(error: unknown): TaskProblem {
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

function toAnswer(task: TaskRecord): TaskAnswer {
  const { id, kind, state, progress, recordSetId, revisionId, problem, createdAt, createdBy } = task;
  const done = state === 'done';
  return {
    ...{ id, kind, state, progress, recordSetId, problem, createdAt },
    revisionId: done ? revisionId : null,
    createdBy: { ...createdBy },
  };
}
