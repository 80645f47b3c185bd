import { bringInRevision, bringInSet } from './bring-in';
import { craneRows, liftedBefore } from './crane-records';
import { craneTimeWords } from './estimator-words';
import { craneForward, craneRidge } from './specifications';
import { on, type Stage, type Step } from './stage';
import type { TableRow } from './table';

const slug = 'crane-time';

/** The edition in force knows the old crane only; a draft with the new one's months waits on the analyst's table. */
export function craneSteps(stage: Stage): Step[] {
  const rows = craneRows(1500);
  return [...firstEdition(stage, liftedBefore(rows, '2025-11-01')), ...newCrane(stage, rows)];
}

function firstEdition(stage: Stage, rows: readonly TableRow[]): Step[] {
  const { firstAnalyst: ines, reviewer } = stage.cast;
  const set = { name: 'Crane lifts', description: 'Lifts of the federation’s crane, from the foreman’s book.' };
  return [
    on(382, '08:40', () =>
      bringInSet(stage, ines, { ...set, revision: 'lifts 1', fileName: 'crane-book-2022-2025.csv', rows }),
    ),
    on(382, '09:15', () => stage.nameEstimator(ines, craneTimeWords)),
    on(381, '10:44', () => stage.fit(ines, { slug, name: 'crane 1', revision: 'lifts 1', specification: craneRidge })),
    on(378, '11:20', () =>
      stage.drawUp(ines, { slug, name: 'crane 1', changeNote: 'First edition, from the foreman’s book.' }),
    ),
    on(378, '11:24', () => stage.submit(ines, 'crane 1')),
    on(377, '13:12', () => stage.putInForce(reviewer, slug, 'crane 1')),
  ];
}

function newCrane(stage: Stage, rows: readonly TableRow[]): Step[] {
  const tomas = stage.cast.secondAnalyst;
  const changeNote = 'Draft: two cranes in one formula. The months since April do not fit; wait for more of them.';
  return [
    on(31, '09:33', () =>
      bringInRevision(stage, tomas, {
        set: 'Crane lifts',
        revision: 'lifts 2',
        fileName: 'crane-book-2022-2026.csv',
        rows,
      }),
    ),
    on(28, '14:20', () =>
      stage.fit(tomas, { slug, name: 'crane 2', revision: 'lifts 2', specification: craneForward }),
    ),
    on(3, '15:48', () => stage.drawUp(tomas, { slug, name: 'crane 2', changeNote })),
  ];
}
