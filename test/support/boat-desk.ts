import type { components } from '../../openapi/types/desk';
import { join } from 'node:path';
import { refitLabour } from './published-estimator';
import { endOfTask } from './record-task';
import type { TestAgent, TestService } from './test-service';

type RecordSet = components['schemas']['RecordSetDetail'];

export const boatCount = 60;
/** Three columns; every row of its own. */
export const boats = [
  'length (m),hull,hours',
  ...Array.from(
    { length: boatCount },
    (_, row) => `${7 + (row % 13) / 2},${row % 3 ? 'oak' : 'steel'},${90 + row * 2}`,
  ),
].join('\n');
export const boatSpecification = {
  target: { column: 'hours' },
  inputs: [{ column: 'length (m)' }, { column: 'hull' }],
  method: 'ridge',
};
/** Of a revision that is gone. */
export const nothingLeft = { row: 0, columns: 0, blocks: 0, drafts: 0, fits: 0 };

const oakToWood = [{ kind: 'map-levels', column: 'hull', levels: { oak: 'wood' } }];

/** An analyst with an estimator, and what they do with sets of boats. */
export async function openBoatDesk(service: TestService, analyst: TestAgent) {
  await analyst.post('/api/estimators').send(refitLabour).expect(201);
  let made = 0;
  const count = async (table: string, where: object): Promise<number> =>
    Number((await service.services.knex(table).where(where).count({ n: '*' }).first())?.['n']);
  async function startFit(revisionId: string): Promise<string> {
    const body = { revisionId, specification: boatSpecification };
    const begun = await analyst.post('/api/estimators/refit-labour/fits').send(body).expect(202);
    return begun.body.id as string;
  }
  return {
    startFit,
    async bringIn(text = boats): Promise<RecordSet> {
      const answer = await analyst
        .post('/api/record-sets')
        .field('name', `Boats ${++made}`)
        .attach('file', Buffer.from(text), 'boats.csv')
        .expect(201);
      return answer.body as RecordSet;
    },
    async mend(revisionId: string, steps: readonly object[] = oakToWood): Promise<string> {
      const begun = await analyst
        .post(`/api/record-revisions/${revisionId}/mended-revisions`)
        .send({ steps })
        .expect(202);
      const task = await endOfTask(analyst, begun.body.id as string);
      expect(task).toMatchObject({ state: 'done', problem: null });
      return task.revisionId as string;
    },
    async fit(revisionId: string): Promise<string> {
      const id = await startFit(revisionId);
      expect(await service.services.fits.waitFor(id)).toBe('done');
      return id;
    },
    async draftEdition(fitId: string): Promise<string> {
      const draft = await analyst
        .post('/api/estimators/refit-labour/editions')
        .send({ fitId, changeNote: 'Drawn up for a test.' })
        .expect(201);
      return draft.body.id as string;
    },
    /** Rows of the database that speak of a revision. */
    left: async (revisionId: string) => ({
      row: await count('recordRevisions', { id: revisionId }),
      columns: await count('recordColumns', { revisionId }),
      blocks: await count('recordBlocks', { revisionId }),
      drafts: await count('mendingDrafts', { revisionId }),
      fits: await count('fits', { revisionId }),
    }),
    pathOf: (name: string): string => join(service.services.config.dataFolder, 'uploads', name),
    journalOf: (recordSetId: string) =>
      service.services.knex('journal').where({ subjectKind: 'record-set', subjectId: recordSetId }).orderBy('id'),
  };
}

export type BoatDesk = Awaited<ReturnType<typeof openBoatDesk>>;
