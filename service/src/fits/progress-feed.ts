import { EventEmitter } from 'node:events';
import type { components } from '../../../openapi/types/desk';
import type { FitsStore, FitState } from './fits-store';

export type FitStep = components['schemas']['FitProgressEvent'];

/** Another process may run the fit: then only the database tells. */
const lookEveryMs = 1000;

export const isFinal = (state: FitState): boolean => state !== 'queued' && state !== 'running';

export interface FitFollower {
  readonly step: (step: FitStep) => void;
  /** Called once, after the final step. */
  readonly end: () => void;
}

/** Tells whoever follows a fit of its steps: at once when it runs here, and otherwise as the database shows them. */
export class ProgressFeed {
  private readonly emitter = new EventEmitter().setMaxListeners(0);

  constructor(private readonly fits: FitsStore) {}

  publish(id: string, step: FitStep): void {
    this.emitter.emit(id, step);
  }

  /** Gives the present step first. Returns what stops the following. */
  follow(id: string, follower: FitFollower): () => void {
    let told = '';
    const stop = (): void => {
      clearInterval(timer);
      this.emitter.off(id, tell);
    };
    const tell = (step: FitStep): void => {
      const text = JSON.stringify(step);
      if (text === told) return;
      told = text;
      follower.step(step);
      if (!isFinal(step.state)) return;
      stop();
      follower.end();
    };
    const look = (): void => {
      this.fits.stateOf(id).then(
        (step) => step && !isFinal(lastState(told)) && tell(step),
        // The database is being closed: the next look or the end of the process settles it.
        () => undefined,
      );
    };
    this.emitter.on(id, tell);
    const timer = setInterval(look, lookEveryMs).unref();
    look();
    return stop;
  }
}

function lastState(told: string): FitState {
  return told === '' ? 'queued' : (JSON.parse(told) as FitStep).state;
}
