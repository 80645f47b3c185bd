import { FitQueueStore } from './fits/fit-queue-store';
import { FitRunner, type FitRunnerParts } from './fits/fit-runner';
import { FitSettlement } from './fits/fit-settlement';
import { FitsService, type FitsParts } from './fits/fits-service';
import { FitsStore } from './fits/fits-store';
import { ProgressFeed } from './fits/progress-feed';
import { RevisionFactsStore } from './fits/revision-facts-store';

type Given = Omit<FitsParts, 'fits' | 'revisions' | 'runner' | 'feed'> &
  Omit<FitRunnerParts, 'queue' | 'feed' | 'settlement'>;

export interface FitsRoom {
  readonly fits: FitsService;
  /** Idle until opened, but for fits that this process starts. */
  readonly fitRunner: FitRunner;
  readonly fitsStore: FitsStore;
}

/** The part of the composition that belongs to fits: queue, threads, progress and the service over them. */
export function composeFits(given: Given): FitsRoom {
  const fitsStore = new FitsStore(given.database);
  const queue = new FitQueueStore(given.database);
  const feed = new ProgressFeed(fitsStore);
  const settlement = new FitSettlement({ ...given, queue, feed });
  const fitRunner = new FitRunner({ ...given, queue, feed, settlement });
  const revisions = new RevisionFactsStore(given.database);
  return {
    fits: new FitsService({ ...given, fits: fitsStore, revisions, runner: fitRunner, feed }),
    fitRunner,
    fitsStore,
  };
}
