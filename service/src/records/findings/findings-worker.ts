import { parentPort, workerData } from 'node:worker_threads';
import { readRecordTable } from '../record-table-reader';
import { findProblems } from './find-problems';
import type { FindingsOutcome, FindingsTask } from './findings-task';

/** Runs in a worker thread: one revision, then it ends. */
const { databasePath, revisionId, target } = workerData as FindingsTask;
const findings: FindingsOutcome = findProblems(readRecordTable(databasePath, revisionId), target ?? undefined);
parentPort?.postMessage(findings);
