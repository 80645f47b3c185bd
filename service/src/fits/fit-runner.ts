import { availableParallelism } from 'node:os';
import type { Logger } from 'pino';
import { timeText, type Clock } from '../clock';
import { isAlive, mayBeClaimed, newClaimName } from './fit-claim';
import type { FitQueueStore } from './fit-queue-store';
import { failureOf, type FitSettlement, type Stopping } from './fit-settlement';
import { startFitThread, type FitThread, type ThreadOutcome } from './fit-thread';
import type { ProgressFeed } from './progress-feed';
import { ProgressThrottle } from './progress-throttle';

/** Also how long a cancel asked of another process may take. */
const beatEveryMs = 2000;
const lookEveryMs = 5000;
const progressEveryMs = 200;

export interface FitRunnerParts {
  readonly databasePath: string;
  readonly queue: FitQueueStore;
  readonly feed: ProgressFeed;
  readonly settlement: FitSettlement;
  readonly clock: Clock;
  readonly log: Logger;
  /** Node's own arguments for a fit's thread. */
  readonly threadArguments: readonly string[];
}

interface RunningFit {
  readonly thread: FitThread;
  /** Why the thread is being stopped, when it is. */
  stopping: Stopping | null;
}

/**
 * Runs queued fits in worker threads, one core left free for answering. Several processes may run one each over the same
 * database: a fit is claimed by a conditional update and kept by a heartbeat.
 */
export class FitRunner {
  private readonly claimName = newClaimName();
  private readonly running = new Map<string, RunningFit>();
  private readonly settling = new Set<Promise<void>>();
  private readonly mostAtOnce = Math.max(1, availableParallelism() - 1);
  private timer: NodeJS.Timeout | undefined;
  private looking: Promise<void> | null = null;
  private closed = false;

  constructor(private readonly parts: FitRunnerParts) {}

  /** Takes up what was left, and from now on whatever other processes leave. */
  open(): void {
    this.timer = setInterval(() => this.wake(), lookEveryMs).unref();
    this.wake();
  }

  /** Looks into the queue. Never call it inside a unit of work: the fit would outlive the transaction. */
  wake(): void {
    this.looking = (this.looking ?? Promise.resolve())
      .then(() => this.claimAll())
      .catch((error: unknown) => this.parts.log.error({ err: error }, 'the queue of fits could not be read'));
  }

  /** Stops the fit if this process runs it. */
  cancel(id: string): void {
    this.stop(id, 'cancelled');
  }

  /** Ends the threads and puts their fits back into the queue. */
  async close(): Promise<void> {
    this.closed = true;
    clearInterval(this.timer);
    await this.looking;
    for (const id of this.running.keys()) this.stop(id, 'released');
    await Promise.all(this.settling);
  }

  private stop(id: string, why: Stopping): void {
    const fit = this.running.get(id);
    if (!fit) return;
    fit.stopping ??= why;
    void fit.thread.stop();
  }

  private async claimAll(): Promise<void> {
    const { queue, clock } = this.parts;
    if (this.closed || this.running.size >= this.mostAtOnce) return;
    const view = { nowMs: clock.now().getTime(), claimName: this.claimName, isAlive };
    for (const fit of (await queue.claimable()).filter((candidate) => mayBeClaimed(candidate, view))) {
      if (this.closed || this.running.size >= this.mostAtOnce) return;
      if (await queue.claim(fit, this.claimName, timeText(clock))) await this.start(fit.id);
    }
  }

  private async start(id: string): Promise<void> {
    const { queue, feed, databasePath, threadArguments } = this.parts;
    const fit = await queue.read(id);
    if (!fit) return;
    const progress = new ProgressThrottle<Parameters<FitQueueStore['saveProgress']>[2]>(progressEveryMs, (newest) => {
      feed.publish(id, { state: 'running', progress: newest });
      queue
        .saveProgress(id, this.claimName, newest)
        .catch((error: unknown) => this.parts.log.warn({ err: error, fitId: id }, 'progress could not be kept'));
    });
    const { revisionId, specification } = fit;
    const thread = startFitThread(
      { databasePath, revisionId, specification },
      { onProgress: (step) => progress.offer(step), nodeArguments: threadArguments },
    );
    this.running.set(id, { thread, stopping: null });
    const heart = setInterval(() => void this.beat(id), beatEveryMs).unref();
    const settled = this.outcomeOf(id, thread)
      .finally(() => {
        clearInterval(heart);
        progress.stop();
      })
      .then((outcome) =>
        this.parts.settlement.settle({
          id,
          claimName: this.claimName,
          outcome,
          stopping: this.running.get(id)?.stopping ?? null,
        }),
      )
      .catch((error: unknown) => this.parts.log.error({ err: error, fitId: id }, 'the end of a fit could not be kept'))
      .finally(() => {
        this.running.delete(id);
        this.settling.delete(settled);
        if (!this.closed) this.wake();
      });
    this.settling.add(settled);
  }

  private async outcomeOf(id: string, thread: FitThread): Promise<ThreadOutcome> {
    try {
      return await thread.outcome;
    } catch (error) {
      this.parts.log.error({ err: error, fitId: id }, 'a fit broke its thread');
      return { kind: 'failed', failure: failureOf(error) };
    }
  }

  private async beat(id: string): Promise<void> {
    try {
      const answer = await this.parts.queue.beat(id, this.claimName, timeText(this.parts.clock));
      if (answer === 'cancel') this.stop(id, 'cancelled');
      if (answer === 'lost') this.stop(id, 'lost');
    } catch (error) {
      this.parts.log.warn({ err: error, fitId: id }, 'a heartbeat of a fit could not be kept');
    }
  }
}
