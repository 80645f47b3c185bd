import { workerData } from 'node:worker_threads';
import type { ProposalTask } from './import-task';
import { proposeReading } from './reading/propose-reading';
import { answerFromThread } from './table-worker';

const { path, choices, base } = workerData as ProposalTask;

answerFromThread(() => proposeReading(path, choices ?? {}, base));
