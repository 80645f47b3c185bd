import type { EditionState, FitState } from '../api/contract';
import type { Stamp } from './status-stamp';

export const EDITION_STAMPS: Readonly<Record<EditionState, Stamp>> = {
  draft: { word: 'Draft', tone: 'past' },
  'under-review': { word: 'Under review', tone: 'waiting' },
  'in-force': { word: 'In force', tone: 'good' },
  superseded: { word: 'Superseded', tone: 'past' },
  withdrawn: { word: 'Withdrawn', tone: 'bad' },
};

export const FIT_STAMPS: Readonly<Record<FitState, Stamp>> = {
  queued: { word: 'Waiting', tone: 'past' },
  running: { word: 'Under way', tone: 'waiting' },
  done: { word: 'Done', tone: 'good' },
  failed: { word: 'Failed', tone: 'bad' },
  cancelled: { word: 'Cancelled', tone: 'past' },
};
