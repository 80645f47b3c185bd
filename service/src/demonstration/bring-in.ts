import { rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import type { components } from '../../../openapi/types/desk';
import type { SignedInPerson } from '../people/person';
import { required, type Stage } from './stage';
import { toCsv, type TableRow } from './table';

type ReadingChoices = components['schemas']['ReadingChoices'];

export interface FileScene {
  /** What later steps call the revision by. */
  readonly revision: string;
  readonly fileName: string;
  readonly rows: readonly TableRow[];
  /** What the analyst changed in the proposal. */
  readonly choices?: ReadingChoices;
}

export interface SetScene extends FileScene {
  readonly name: string;
  readonly description: string;
}

export interface RevisionScene extends FileScene {
  /** Name of the record set. */
  readonly set: string;
  /** The revision that the file's rows are appended to; without it they stand alone. */
  readonly appendTo?: string;
}

async function withFile<Result>(
  stage: Stage,
  { fileName, rows }: FileScene,
  work: (path: string) => Promise<Result>,
): Promise<Result> {
  const path = join(stage.services.config.dataFolder, fileName);
  await writeFile(path, toCsv(rows));
  try {
    return await work(path);
  } finally {
    await rm(path);
  }
}

export async function bringInSet(stage: Stage, by: SignedInPerson, scene: SetScene): Promise<void> {
  const { name, description, fileName, choices } = scene;
  const set = await withFile(stage, scene, (path) =>
    stage.services.records.importFile({ path, fileName, name, description, choices, personId: by.id }),
  );
  stage.recordSets.set(name, set.id);
  stage.revisions.set(scene.revision, set.revision.id);
}

export async function bringInRevision(stage: Stage, by: SignedInPerson, scene: RevisionScene): Promise<void> {
  const recordSetId = required(stage.recordSets, scene.set);
  const { fileName, choices } = scene;
  const appendTo = scene.appendTo === undefined ? undefined : required(stage.revisions, scene.appendTo);
  const revision = await withFile(stage, scene, (path) =>
    stage.services.records.importRevision({ path, fileName, recordSetId, choices, appendTo, personId: by.id }),
  );
  stage.revisions.set(scene.revision, revision.id);
}
