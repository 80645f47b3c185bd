import { parentPort, workerData } from 'node:worker_threads';
import type { RecordColumn } from '../../regression/records';
import { readRecordTable } from '../record-table-reader';
import { applySteps, StepProblem } from './apply-steps';
import type { TrialOutcome, TrialTask } from './mend-task';

function missingIn(column: RecordColumn): number {
  let missing = 0;
  if (column.kind === 'category') for (const code of column.codes) missing += code < 0 ? 1 : 0;
  else if (column.kind === 'text') for (const text of column.values) missing += text === null ? 1 : 0;
  else for (const value of column.values) missing += value === value ? 0 : 1;
  return missing;
}

function tryOut({ databasePath, revisionId, steps }: TrialTask): TrialOutcome {
  try {
    const { table, effects } = applySteps(readRecordTable(databasePath, revisionId), steps);
    const columns = table.columns.map((column) => ({
      ...{ name: column.name, kind: column.kind, missingCount: missingIn(column) },
      unit: column.kind === 'numeric' ? (column.unit ?? null) : null,
    }));
    return { kind: 'tried', trial: { rowCount: table.rowCount, effects: [...effects], columns } };
  } catch (error) {
    if (error instanceof StepProblem) return { kind: 'problem', step: error.step, message: error.message };
    throw error;
  }
}

/** Runs in a worker thread: steps on one revision, of which nothing is written; then it ends. */
parentPort?.postMessage(tryOut(workerData as TrialTask));
