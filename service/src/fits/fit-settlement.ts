import { timeText, type Clock } from '../clock';
import type { Database } from '../database/database';
import type { Journal } from '../journal/journal';
import type { FitQueueStore } from './fit-queue-store';
import type { FitFailure } from './fit-task';
import type { ThreadOutcome } from './fit-thread';
import type { FitState } from './fits-store';
import type { ProgressFeed } from './progress-feed';

/** Why a thread was stopped: somebody asked, this process ends, or another process has taken the fit up. */
export type Stopping = 'cancelled' | 'released' | 'lost';

export interface EndedFit {
  readonly id: string;
  readonly claimName: string;
  readonly outcome: ThreadOutcome;
  readonly stopping: Stopping | null;
}

interface FitSettlementParts {
  readonly database: Database;
  readonly queue: FitQueueStore;
  readonly feed: ProgressFeed;
  readonly journal: Journal;
  readonly clock: Clock;
}

/** Keeps what became of a fit, with its line in the journal, and tells those who follow it. */
export class FitSettlement {
  constructor(private readonly parts: FitSettlementParts) {}

  async settle(fit: EndedFit): Promise<void> {
    const state = await this.parts.database.unitOfWork(() => this.keep(fit));
    if (!state) return;
    const isDone = state === 'done';
    this.parts.feed.publish(fit.id, { state, progress: { stage: state, done: isDone ? 1 : 0, total: 1 } });
  }

  /** The state that was reached; null when the fit goes on elsewhere. */
  private async keep(fit: EndedFit): Promise<FitState | null> {
    const { queue, clock } = this.parts;
    const { id, claimName, outcome } = fit;
    const at = timeText(clock);
    if (outcome.kind === 'done') {
      const kept = await queue.finish(id, claimName, { ...outcome.finished, finishedAt: at });
      return this.noted(fit, kept ? 'done' : null, 'is done');
    }
    if (outcome.kind === 'failed') return this.keepFailure(fit, outcome.failure);
    if (fit.stopping === 'released') await queue.release(id, claimName);
    if (fit.stopping === 'cancelled') return (await queue.cancel(id, claimName, at)) ? 'cancelled' : null;
    return fit.stopping === null ? this.keepFailure(fit, threadEnded) : null;
  }

  private async keepFailure(fit: EndedFit, failure: FitFailure): Promise<FitState | null> {
    const kept = await this.parts.queue.fail(fit.id, fit.claimName, failure, timeText(this.parts.clock));
    return this.noted(fit, kept ? 'failed' : null, `failed: ${failure.code}`);
  }

  private async noted(fit: EndedFit, state: FitState | null, what: string): Promise<FitState | null> {
    if (!state) return null;
    const summary = `A fit of ${await this.parts.queue.estimatorNameOf(fit.id)} ${what}`;
    await this.parts.journal.write({
      actorId: null,
      action: `fit-${state}`,
      subjectKind: 'fit',
      subjectId: fit.id,
      summary,
    });
    return state;
  }
}

const threadEnded: FitFailure = {
  code: 'internal',
  message: 'The fit’s thread ended before the fit did. Start it again.',
  column: null,
};

/** What a broken thread means to the person who waits. */
export function failureOf(error: unknown): FitFailure {
  if ((error as { code?: unknown }).code === 'ERR_WORKER_OUT_OF_MEMORY') {
    return {
      code: 'out-of-memory',
      message: 'The records and inputs need more memory than the service has. Use fewer inputs or records.',
      column: null,
    };
  }
  const message =
    'The fit stopped for a reason that is in the service’s log. Start it again; if it stops again, tell an administrator.';
  return { code: 'internal', message, column: null };
}
