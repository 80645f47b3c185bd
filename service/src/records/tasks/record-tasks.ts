import pLimit from 'p-limit';
import type { Logger } from 'pino';
import { timeText, type Clock } from '../../clock';
import { newId } from '../../database/new-id';
import { DeskError, notFound } from '../../errors';
import type { RecordTasksStore, TaskEnd, TaskKind, TaskProgress, TaskRecord } from './record-tasks-store';
import {
  callerGone,
  cancelledByPerson,
  serviceStopped,
  TaskStop,
  toTaskAnswer,
  toTaskProblem,
  type TaskAnswer,
} from './task-answer';
import { TaskVoice } from './task-voice';

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

/** A task that this process is at. */
interface OwnTask {
  readonly id: string;
  readonly revisionId: string;
  readonly controller: AbortController;
  readonly voice: TaskVoice;
}

/** Revisions made at the same time in one process; the others wait, so that memory stays bounded. */
const madeAtOnce = 1;
/** A task of another process that has said nothing for so long has died with it. */
const silentMs = 60_000;
/** Ended tasks are kept as long as somebody may still look at them. */
const keptMs = 7 * 24 * 60 * 60 * 1000;

/** Runs what makes revisions one after another, lets it be followed from any process, and cancelled. */
export class RecordTasks {
  private readonly queue = pLimit(madeAtOnce);
  private readonly own = new Map<string, OwnTask>();
  private readonly endings = new Set<Promise<unknown>>();
  private closed = false;

  constructor(private readonly parts: RecordTasksParts) {}

  /** Begins the work and answers at once. */
  async start(work: TaskWork): Promise<TaskAnswer> {
    const { task } = await this.begin(work);
    return this.read(task.id);
  }

  /** Does the work and answers with the revision's id, or throws what went wrong. `signal` cancels it. */
  async finish(work: TaskWork, signal?: AbortSignal): Promise<string> {
    const { task, end } = await this.begin(work);
    const stop = (): void => task.controller.abort(callerGone());
    signal?.addEventListener('abort', stop, { once: true });
    if (signal?.aborted) stop();
    await end.finally(() => signal?.removeEventListener('abort', stop));
    return task.revisionId;
  }

  async read(id: string): Promise<TaskAnswer> {
    const task = await this.parts.tasks.find(id);
    if (!task) throw notFound('task');
    return toTaskAnswer(this.isLost(task) ? { ...task, ...endOfLost(task) } : task);
  }

  async cancel(id: string): Promise<TaskAnswer> {
    const task = await this.parts.tasks.find(id);
    if (!task) throw notFound('task');
    if (this.isLost(task) || !(await this.parts.tasks.askToCancel(id)))
      throw new DeskError('task-ended', 'The work has ended; there is nothing left to cancel.');
    this.own.get(id)?.controller.abort(cancelledByPerson());
    return this.read(id);
  }

  /** Stops what runs or waits here, and waits until it has cleared up. Nothing is begun afterwards. */
  async close(): Promise<void> {
    this.closed = true;
    for (const { controller } of this.own.values()) controller.abort(serviceStopped());
    await Promise.allSettled([...this.endings]);
  }

  async sweep(): Promise<void> {
    await this.parts.tasks.removeBefore(new Date(this.parts.clock.now().getTime() - keptMs).toISOString());
  }

  private async begin(work: TaskWork): Promise<{ readonly task: OwnTask; readonly end: Promise<void> }> {
    if (this.closed) throw serviceStopped();
    const controller = new AbortController();
    const id = newId();
    const voice = new TaskVoice(this.parts, id, () => controller.abort(cancelledByPerson()));
    const task = { id, revisionId: newId(), controller, voice };
    this.own.set(id, task);
    const entered = this.enter(task, work);
    const end = entered
      .then(() => this.carryOut(task, work))
      .finally(() => {
        this.own.delete(id);
        this.endings.delete(end);
      });
    this.endings.add(end);
    end.catch(() => undefined);
    await entered;
    return { task, end };
  }

  private async enter({ id, revisionId, voice }: OwnTask, { kind, personId }: TaskWork): Promise<void> {
    const now = timeText(this.parts.clock);
    const { state, progress } = voice;
    const times = { saidAt: now, createdAt: now };
    await this.parts.tasks.insert({ id, kind, state, progress, revisionId, ...times, createdBy: personId });
  }

  private async carryOut(task: OwnTask, work: TaskWork): Promise<void> {
    const { voice, controller } = task;
    voice.start();
    try {
      const { recordSetId } = await this.atItsTurn(task, work);
      await voice.stop();
      await this.settle(task, { state: 'done', recordSetId, problem: null });
    } catch (error) {
      await voice.stop();
      const { reason } = controller.signal as { readonly reason: unknown };
      const told = reason instanceof TaskStop ? reason : error;
      await this.settle(task, this.endOf(told));
      throw told;
    }
  }

  /** Waits for its turn and does the work; cancelled while it waits, it goes at once. */
  private atItsTurn({ revisionId, voice, controller }: OwnTask, work: TaskWork): ReturnType<TaskWork['run']> {
    const { signal } = controller;
    return new Promise((resolve, reject) => {
      const leave = (): void => {
        if (voice.state === 'queued') reject(signal.reason as TaskStop);
      };
      signal.addEventListener('abort', leave, { once: true });
      if (signal.aborted) leave();
      const turn = this.queue(async () => {
        if (!signal.aborted) await voice.begin();
        signal.throwIfAborted();
        const progress = (step: TaskProgress): void => void (voice.progress = step);
        return work.run({ revisionId, signal, progress });
      });
      turn.then(resolve, reject);
    });
  }

  private endOf(error: unknown): TaskEnd {
    if (error instanceof TaskStop && error.state === 'cancelled')
      return { state: 'cancelled', recordSetId: null, problem: null };
    if (!(error instanceof DeskError)) this.parts.log.error({ err: error }, 'work on records failed');
    return { state: 'failed', recordSetId: null, problem: toTaskProblem(error) };
  }

  /** What was done counts even if its end could not be written down: the task then shows as lost or done by itself. */
  private async settle({ id, voice }: OwnTask, end: TaskEnd): Promise<void> {
    try {
      await this.parts.tasks.end(id, end, { progress: voice.progress, saidAt: timeText(this.parts.clock) });
    } catch (error) {
      this.parts.log.error({ err: error, task: id }, 'the end of a task could not be kept');
    }
  }

  private isLost({ id, state, saidAt }: TaskRecord): boolean {
    if ((state !== 'queued' && state !== 'running') || this.own.has(id)) return false;
    return this.parts.clock.now().getTime() - Date.parse(saidAt) > silentMs;
  }
}

/** A process may have died between making the revision and saying so: the revision counts. */
const endOfLost = ({ madeIn }: TaskRecord): TaskEnd =>
  madeIn !== null
    ? { state: 'done', recordSetId: madeIn, problem: null }
    : { state: 'failed', recordSetId: null, problem: toTaskProblem(serviceStopped()) };
