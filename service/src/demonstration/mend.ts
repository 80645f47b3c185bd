import type { components } from '../../../openapi/types/desk';
import type { SignedInPerson } from '../people/person';
import { required, type Stage } from './stage';

type Finding = components['schemas']['Finding'];

export interface MendingScene {
  /** The revision to mend, and what later steps call the mended one by. */
  readonly from: string;
  readonly revision: string;
}

/** What an analyst takes up without asking the yards; outlying jobs and columns that overlap are for the fit to hold. */
const mendedKinds: readonly Finding['kind'][] = ['unit-mix-up', 'levels-alike', 'repeated-rows'];

/** Mends what the search finds. Rows are named by number, so what drops rows comes last. */
export async function mendFindings(stage: Stage, by: SignedInPerson, scene: MendingScene): Promise<void> {
  const { recordFindings, recordMending } = stage.services;
  const from = required(stage.revisions, scene.from);
  const { items } = await recordFindings.list(from, undefined);
  const steps = mendedKinds.flatMap((kind) => items.filter((item) => item.kind === kind).flatMap((item) => item.steps));
  stage.revisions.set(scene.revision, await recordMending.mendToEnd(by.id, from, steps));
}
