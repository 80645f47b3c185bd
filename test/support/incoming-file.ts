import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import type { components } from '../../openapi/types/desk';
import { endOfTask } from './record-task';
import type { TestAgent, TestService } from './test-service';

type Schemas = components['schemas'];
export type IncomingFile = Schemas['IncomingFile'];
type RecordTask = Schemas['RecordTask'];

export async function sendFile(agent: TestAgent, text: string | Buffer, fileName = 'boats.csv'): Promise<IncomingFile> {
  const answer = await agent.post('/api/incoming-files').attach('file', Buffer.from(text), fileName);
  if (answer.status !== 201) throw new Error(`The file was not received: ${JSON.stringify(answer.body)}`);
  return answer.body as IncomingFile;
}

/** Begins to bring the file in. */
export async function beginToBringIn(
  agent: TestAgent,
  file: IncomingFile,
  as: Schemas['BringInRequest']['as'],
  choices: Schemas['ReadingChoices'] = {},
): Promise<RecordTask> {
  const answer = await agent.post(`/api/incoming-files/${file.id}/bring-in`).send({ choices, as });
  if (answer.status !== 202) throw new Error(`The file is not brought in: ${JSON.stringify(answer.body)}`);
  return answer.body as RecordTask;
}

/** Brings the file in, to the task's end. */
export async function bringIn(...given: Parameters<typeof beginToBringIn>): Promise<RecordTask> {
  const { id } = await beginToBringIn(...given);
  return endOfTask(given[0], id);
}

export const uploadsOf = (service: TestService): string[] =>
  readdirSync(join(service.services.config.dataFolder, 'uploads')).sort();

/** All that a file leaves when it is brought in, counted: the same before and after, when nothing was kept. */
export async function keptOf(service: TestService): Promise<Readonly<Record<string, unknown>>> {
  const { knex } = service.services;
  const tables = ['recordSets', 'recordRevisions', 'recordColumns', 'recordBlocks', 'incomingFiles'];
  const counts = await Promise.all(tables.map((table) => knex(table).count({ rows: '*' }).first()));
  return {
    uploads: uploadsOf(service),
    ...Object.fromEntries(tables.map((table, at) => [table, Number(counts[at]?.['rows'])])),
  };
}
