import type { MendStep, MendingDraft, MendingTrial, RecordRevision, RecordTask } from '../../api/contract';
import { RECORD_SET, REVISION } from './refits';

/** Invented mending of the demonstration's yards, for specs. */
export const FEET: MendStep = {
  kind: 'convert-unit',
  column: 'Length overall',
  factor: 0.3048,
  where: '[Length overall] > 20',
};
export const RENAME: MendStep = { kind: 'rename', column: 'Hull material', to: 'Hull' };
export const REPEATED: MendStep = { kind: 'drop-repeated-rows' };

export function draftOfSteps(...steps: MendStep[]): MendingDraft {
  return { steps, changedAt: steps.length > 0 ? '2026-10-21T09:14:00Z' : null };
}

/** What the service would say of steps that can all be done. */
export function trialOf(...effects: MendingTrial['effects']): MendingTrial {
  const columns = REVISION.columns.map(({ name, kind, unit, missingCount }) => ({ name, kind, unit, missingCount }));
  return { rowCount: 1990, effects, columns };
}

export const FEET_EFFECT = { told: 'Multiplied Length overall by 0.3048 in 14 rows.', rowsConcerned: 14 };
export const RENAME_EFFECT = { told: 'Renamed Hull material to Hull.', rowsConcerned: null };
export const REPEATED_EFFECT = { told: 'Dropped 0 rows.', rowsConcerned: 0 };

export const MENDED: RecordRevision = {
  ...REVISION,
  id: 'revision3',
  number: 3,
  origin: 'mended',
  basedOn: { id: 'revision2', number: 2 },
  mending: { from: 'revision2', steps: [FEET, RENAME], changes: [FEET_EFFECT.told, RENAME_EFFECT.told] },
};

export const SET_WITH_MENDED = {
  ...RECORD_SET,
  lastNumber: MENDED.number,
  revision: MENDED,
  revisions: [...RECORD_SET.revisions, MENDED],
};

export function mendTask(state: RecordTask['state'], change: Partial<RecordTask> = {}): RecordTask {
  return {
    id: 'task00000001',
    kind: 'mend',
    state,
    progress: { stage: 'mending', done: 1, total: 2 },
    recordSetId: state === 'done' ? RECORD_SET.id : null,
    revisionId: state === 'done' ? MENDED.id : null,
    problem: null,
    createdAt: '2026-10-21T09:14:00Z',
    createdBy: RECORD_SET.createdBy,
    ...change,
  };
}
