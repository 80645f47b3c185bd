import type { Logger } from 'pino';
import type { Job } from './job';

/** So that a process that is restarted every day still does the daily work. */
const firstRunAfterMs = 60_000;

/** Runs jobs by the clock. Its timers keep no process alive, and a job never overlaps itself. */
export class Schedule {
  private readonly timers: NodeJS.Timeout[] = [];
  private readonly running = new Map<string, Promise<void>>();

  constructor(
    private readonly jobs: readonly Job[],
    private readonly log: Logger,
  ) {}

  start(): void {
    for (const job of this.jobs) {
      const run = (): void => void this.runOnce(job);
      this.timers.push(
        setTimeout(run, Math.min(firstRunAfterMs, job.everyMs)).unref(),
        setInterval(run, job.everyMs).unref(),
      );
    }
  }

  /** Stops the timers and waits for what is running, so that the database can be closed after it. */
  async stop(): Promise<void> {
    for (const timer of this.timers.splice(0)) clearTimeout(timer);
    await Promise.all(this.running.values());
  }

  private async runOnce(job: Job): Promise<void> {
    if (this.running.has(job.name)) return;
    const run = job.run().catch((error: unknown) => this.log.error({ err: error, job: job.name }, 'a job failed'));
    this.running.set(job.name, run);
    await run;
    this.running.delete(job.name);
  }
}
