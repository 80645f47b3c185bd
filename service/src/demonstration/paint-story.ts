import { antifoulingRows } from './antifouling-records';
import { bringInRevision, bringInSet } from './bring-in';
import { antifoulingWords } from './estimator-words';
import { paintLasso, paintRidge } from './specifications';
import { on, type Stage, type Step } from './stage';
import type { TableRow } from './table';

const slug = 'antifouling-paint';

/** Ridge first; then lasso, which needs fewer inputs and loses next to nothing. */
export function paintSteps(stage: Stage): Step[] {
  const rows = antifoulingRows(900);
  return [
    ...firstEdition(
      stage,
      rows.filter((row) => String(row['painted']) < '2025-10-01'),
    ),
    ...secondEdition(stage, rows),
  ];
}

function firstEdition(stage: Stage, rows: readonly TableRow[]): Step[] {
  const { secondAnalyst: tomas, reviewer } = stage.cast;
  const set = { name: 'Antifouling', description: 'Paint drawn from the yards’ stores, one row a boat and season.' };
  return [
    on(402, '10:25', () =>
      bringInSet(stage, tomas, { ...set, revision: 'paint 1', fileName: 'antifouling-2023-2025.csv', rows }),
    ),
    on(402, '11:00', () => stage.nameEstimator(tomas, antifoulingWords)),
    on(399, '09:10', () => stage.fit(tomas, { slug, name: 'paint 1', revision: 'paint 1', specification: paintRidge })),
    on(398, '13:30', () =>
      stage.drawUp(tomas, { slug, name: 'paint 1', changeNote: 'First edition, from three seasons.' }),
    ),
    on(398, '13:33', () => stage.submit(tomas, 'paint 1')),
    on(395, '10:05', () => stage.putInForce(reviewer, slug, 'paint 1')),
  ];
}

function secondEdition(stage: Stage, rows: readonly TableRow[]): Step[] {
  const { firstAnalyst: ines, reviewer } = stage.cast;
  const changeNote = 'Lasso keeps the inputs that earn their place; the others now weigh nothing.';
  return [
    on(122, '09:50', () =>
      bringInRevision(stage, ines, {
        set: 'Antifouling',
        revision: 'paint 2',
        fileName: 'antifouling-2023-2026.csv',
        rows,
      }),
    ),
    on(119, '10:12', () => stage.fit(ines, { slug, name: 'paint 2', revision: 'paint 2', specification: paintLasso })),
    on(118, '09:05', () => stage.drawUp(ines, { slug, name: 'paint 2', changeNote })),
    on(118, '09:08', () => stage.submit(ines, 'paint 2')),
    on(117, '15:55', () => stage.putInForce(reviewer, slug, 'paint 2')),
  ];
}
