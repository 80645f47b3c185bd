import type { Clock } from '../clock';
import type { Database } from '../database/database';
import { DeskError } from '../errors';

interface AttemptRow {
  subject: string;
  failures: number;
  lastFailedAt: string;
  blockedUntil: string;
}

/** Failures that are free of delay for an account and, since many people may share one, for an address. */
const freeFailures = { account: 3, address: 20 } as const;
const longestWaitSeconds = 30 * 60;
const forgetAfterMs = 24 * 60 * 60 * 1000;

export interface SignInSubjects {
  readonly account: string;
  readonly address: string;
}

/** Growing delay after failed attempts: 1 s, then doubling to half an hour, per account and per address. */
export class SignInThrottle {
  constructor(
    private readonly database: Database,
    private readonly clock: Clock,
  ) {}

  async requireAllowed(subjects: SignInSubjects): Promise<void> {
    const rows = await this.table().whereIn('subject', this.names(subjects));
    const until = Math.max(0, ...rows.map((row) => Date.parse(row.blockedUntil)));
    const retryAfter = Math.ceil((until - this.clock.now().getTime()) / 1000);
    if (retryAfter > 0) {
      throw new DeskError('sign-in-throttled', `Wait ${retryAfter} seconds, then try again.`, { retryAfter });
    }
  }

  async recordFailure(subjects: SignInSubjects): Promise<void> {
    await this.database.unitOfWork(async () => {
      await this.countFailure(`account:${subjects.account}`, freeFailures.account);
      await this.countFailure(`address:${subjects.address}`, freeFailures.address);
    });
  }

  async recordSuccess(subjects: SignInSubjects): Promise<void> {
    await this.table()
      .where({ subject: `account:${subjects.account}` })
      .delete();
  }

  /** Rows that count no longer. */
  async forgetOld(): Promise<void> {
    const moment = new Date(this.clock.now().getTime() - forgetAfterMs).toISOString();
    await this.table().where('lastFailedAt', '<', moment).delete();
  }

  private async countFailure(subject: string, free: number): Promise<void> {
    const now = this.clock.now().getTime();
    const before = await this.table().where({ subject }).first();
    const recent = before && now - Date.parse(before.lastFailedAt) < forgetAfterMs ? before.failures : 0;
    const failures = recent + 1;
    const waitSeconds = failures < free ? 0 : Math.min(2 ** (failures - free), longestWaitSeconds);
    const row = {
      subject,
      failures,
      lastFailedAt: new Date(now).toISOString(),
      blockedUntil: new Date(now + waitSeconds * 1000).toISOString(),
    };
    await this.table().insert(row).onConflict('subject').merge();
  }

  private names(subjects: SignInSubjects): string[] {
    return [`account:${subjects.account}`, `address:${subjects.address}`];
  }

  private table() {
    return this.database.table<AttemptRow>('signInAttempts');
  }
}
