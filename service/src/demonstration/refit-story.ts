import { bringInRevision, bringInSet } from './bring-in';
import { mendFindings } from './mend';
import { asReceived, notTaken } from './refit-faults';
import { refitLabourWords } from './estimator-words';
import { finishedBefore, finishedFrom, refitRows } from './refit-records';
import * as specifications from './specifications';
import { on, type Stage, type Step } from './stage';
import type { TableRow } from './table';

const slug = 'refit-labour';
const choices = { columns: [{ name: 'draught (m)', missingMarks: [String(notTaken)] }] };

/** Records come with faults, are mended, and the formula is drawn up three times; a fourth edition waits for review. */
export function refitSteps(stage: Stage): Step[] {
  const rows = refitRows(2400);
  return [
    ...arrival(stage, finishedBefore(rows, '2025-09-01')),
    ...firstEdition(stage),
    ...secondEdition(stage),
    ...thirdEdition(stage, rows),
    ...sinceThen(stage, rows),
  ];
}

function arrival(stage: Stage, rows: readonly TableRow[]): Step[] {
  const ines = stage.cast.firstAnalyst;
  const set = { name: 'Refits', description: 'Finished refits of the nine member yards, from their time sheets.' };
  const received = {
    revision: 'refits 1',
    fileName: 'refits-2020-2025.csv',
    rows: asReceived(rows, { inFeet: 7, inKilograms: 4, spelledOtherwise: 40, duplicates: 9 }),
    choices,
  };
  return [
    on(418, '09:12', () => bringInSet(stage, ines, { ...set, ...received })),
    on(417, '10:02', () => stage.nameEstimator(ines, refitLabourWords)),
    on(417, '10:20', () =>
      stage.fit(ines, {
        slug,
        name: 'refit as received',
        revision: 'refits 1',
        specification: specifications.refitLeastSquares,
      }),
    ),
    on(412, '13:41', () => mendFindings(stage, ines, { from: 'refits 1', revision: 'refits 2' })),
  ];
}

function firstEdition(stage: Stage): Step[] {
  const { firstAnalyst: ines, reviewer } = stage.cast;
  const edition = {
    slug,
    name: 'refit 1',
    changeNote: 'First edition: every measurement by least squares, from mended records.',
  };
  return [
    on(412, '14:05', () =>
      stage.fit(ines, { slug, name: 'refit 1', revision: 'refits 2', specification: specifications.refitLeastSquares }),
    ),
    on(411, '09:30', () => stage.drawUp(ines, edition)),
    on(411, '09:42', () => stage.submit(ines, 'refit 1')),
    on(409, '15:20', () => stage.putInForce(reviewer, slug, 'refit 1')),
  ];
}

function secondEdition(stage: Stage): Step[] {
  const { secondAnalyst: tomas, reviewer } = stage.cast;
  const changeNote =
    'Sizes on the log scale and held by ridge: the lengths share one load, and their weights no longer fight.';
  return [
    on(304, '11:08', () =>
      stage.fit(tomas, { slug, name: 'refit 2', revision: 'refits 2', specification: specifications.refitRidge }),
    ),
    on(301, '09:15', () => stage.drawUp(tomas, { slug, name: 'refit 2', changeNote })),
    on(301, '09:21', () => stage.submit(tomas, 'refit 2')),
    on(298, '14:47', () => stage.putInForce(reviewer, slug, 'refit 2')),
  ];
}

function thirdEdition(stage: Stage, rows: readonly TableRow[]): Step[] {
  const { firstAnalyst: ines, reviewer } = stage.cast;
  const sinceEdition2 = finishedBefore(finishedFrom(rows, '2025-09-01'), '2026-06-01');
  const records = {
    set: 'Refits',
    appendTo: 'refits 1',
    revision: 'refits spring',
    fileName: 'refits-2025-2026-spring.csv',
    rows: asReceived(sinceEdition2, { inFeet: 3, inKilograms: 2, spelledOtherwise: 12, duplicates: 4 }),
    choices,
  };
  const changeNote = 'Records until spring 2026; error now counted on yards that the fit has not seen.';
  const objection =
    'The interval is wider than in edition 2. Ask two yards whether that is true of their jobs, then submit it again.';
  return [
    on(171, '08:55', () => bringInRevision(stage, ines, records)),
    on(171, '09:31', () => mendFindings(stage, ines, { from: 'refits spring', revision: 'refits 3' })),
    on(168, '10:11', () =>
      stage.fit(ines, { slug, name: 'refit lasso', revision: 'refits 3', specification: specifications.refitLasso }),
    ),
    on(168, '10:34', () =>
      stage.fit(ines, { slug, name: 'refit 3', revision: 'refits 3', specification: specifications.refitRidgeByYard }),
    ),
    on(167, '09:40', () => stage.drawUp(ines, { slug, name: 'refit 3', changeNote })),
    on(167, '09:44', () => stage.submit(ines, 'refit 3')),
    on(166, '16:03', () => stage.sendBack(reviewer, 'refit 3', objection)),
    on(165, '09:18', () => stage.submit(ines, 'refit 3')),
    on(164, '11:26', () => stage.putInForce(reviewer, slug, 'refit 3')),
  ];
}

/** The newest file has faults to find; the newest edition waits for somebody to read it. */
function sinceThen(stage: Stage, rows: readonly TableRow[]): Step[] {
  const tomas = stage.cast.secondAnalyst;
  const summer = finishedFrom(rows, '2026-06-01');
  const records = {
    set: 'Refits',
    appendTo: 'refits spring',
    revision: 'refits 4',
    fileName: 'refits-2026-summer.csv',
    rows: asReceived(summer, { inFeet: 5, inKilograms: 3, spelledOtherwise: 9, duplicates: 6 }),
    choices,
  };
  const changeNote = 'Year built as a curve: the oldest boats take less than the straight line said.';
  return [
    on(60, '13:10', () => bringInRevision(stage, tomas, records)),
    on(59, '09:27', () =>
      stage.fit(tomas, {
        slug,
        name: 'refit summer',
        revision: 'refits 4',
        specification: specifications.refitRidgeByYard,
      }),
    ),
    on(4, '14:02', () =>
      stage.fit(tomas, {
        slug,
        name: 'refit 4',
        revision: 'refits 3',
        specification: specifications.refitRidgeWithCurve,
      }),
    ),
    on(3, '10:36', () => stage.drawUp(tomas, { slug, name: 'refit 4', changeNote })),
    on(3, '10:41', () => stage.submit(tomas, 'refit 4')),
  ];
}
