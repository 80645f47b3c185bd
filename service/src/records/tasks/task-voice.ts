import type { Logger } from 'pino';
import { timeText, type Clock } from '../../clock';
import type { RecordTasksStore, TaskProgress } from './record-tasks-store';

const sayEveryMs = 400;

export interface TaskVoiceParts {
  readonly tasks: RecordTasksStore;
  readonly clock: Clock;
  readonly log: Logger;
}

/**
 * Says again and again that a task is alive and how far it is, from when it waits to its end, and hears whether
 * somebody, perhaps through another process, has asked to cancel it.
 */
export class TaskVoice {
  state: 'queued' | 'running' = 'queued';
  progress: TaskProgress = { stage: 'waiting', done: 0, total: 0 };
  private timer: NodeJS.Timeout | undefined;
  private saying: Promise<void> | null = null;
  private stopped = false;

  constructor(
    private readonly parts: TaskVoiceParts,
    private readonly id: string,
    private readonly onCancel: () => void,
  ) {}

  start(): void {
    this.timer = setInterval(() => void this.say(), sayEveryMs).unref();
  }

  /** Once the work has begun it is told at once. */
  async begin(): Promise<void> {
    await this.saying;
    this.state = 'running';
    await this.say();
  }

  /** Nothing is said after this. */
  async stop(): Promise<void> {
    this.stopped = true;
    clearInterval(this.timer);
    await this.saying;
  }

  /** A word that takes long, because the database is busy, is not followed by another one in the meantime. */
  private async say(): Promise<void> {
    if (this.stopped) return;
    this.saying ??= this.sayOnce().finally(() => (this.saying = null));
    await this.saying;
  }

  private async sayOnce(): Promise<void> {
    const { tasks, clock, log } = this.parts;
    try {
      if (await tasks.say(this.id, this.state, this.progress, timeText(clock))) this.onCancel();
    } catch (error) {
      log.warn({ err: error, task: this.id }, 'progress was not kept');
    }
  }
}
