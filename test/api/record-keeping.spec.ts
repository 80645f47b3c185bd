import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { components } from '../../openapi/types/desk';
import { migrationsFolder } from '../../service/src/database/migrations-folder';
import { migrate } from '../../service/src/database/migrator';
import { FitQueueStore } from '../../service/src/fits/fit-queue-store';
import { eraseRetainedRecords } from '../../service/src/jobs/erase-retained-records';
import { refitLabour } from '../support/published-estimator';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

type RecordSet = components['schemas']['RecordSetDetail'];

const dayMs = 24 * 60 * 60 * 1000;
const rowCount = 60;
const boats = [
  'length (m),hull,hours',
  ...Array.from({ length: rowCount }, (_, row) => `${7 + (row % 13) / 2},${row % 3 ? 'oak' : 'steel'},${90 + row * 2}`),
].join('\n');
const specification = {
  target: { column: 'hours' },
  inputs: [{ column: 'length (m)' }, { column: 'hull' }],
  method: 'ridge',
};

describe('keeping records', () => {
  let service: TestService;
  let analyst: TestAgent;
  let colleague: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
    colleague = await service.signIn(await service.addPerson(['analyst'], { name: 'Odile Marsh' }));
    await analyst.post('/api/estimators').send(refitLabour).expect(201);
  });
  afterAll(() => service.close());

  let made = 0;
  async function bringIn(text = boats): Promise<RecordSet> {
    const answer = await analyst
      .post('/api/record-sets')
      .field('name', `Boats ${++made}`)
      .attach('file', Buffer.from(text), 'boats.csv')
      .expect(201);
    return answer.body as RecordSet;
  }
  const oakToWood = [{ kind: 'map-levels', column: 'hull', levels: { oak: 'wood' } }];
  async function mend(revisionId: string, steps: readonly object[] = oakToWood): Promise<string> {
    const begun = await analyst
      .post(`/api/record-revisions/${revisionId}/mended-revisions`)
      .send({ steps })
      .expect(202);
    const task = await endOfTask(analyst, begun.body.id);
    expect(task).toMatchObject({ state: 'done', problem: null });
    return task.revisionId as string;
  }
  async function startFit(revisionId: string): Promise<string> {
    const begun = await analyst
      .post('/api/estimators/refit-labour/fits')
      .send({ revisionId, specification })
      .expect(202);
    return begun.body.id as string;
  }
  async function fit(revisionId: string): Promise<string> {
    const id = await startFit(revisionId);
    expect(await service.services.fits.waitFor(id)).toBe('done');
    return id;
  }
  async function draftEdition(fitId: string): Promise<string> {
    const draft = await analyst
      .post('/api/estimators/refit-labour/editions')
      .send({ fitId, changeNote: 'Drawn up for a test.' })
      .expect(201);
    return draft.body.id as string;
  }
  const count = async (table: string, where: object): Promise<number> =>
    Number((await service.services.knex(table).where(where).count({ n: '*' }).first())?.['n']);
  const left = async (revisionId: string) => ({
    row: await count('recordRevisions', { id: revisionId }),
    columns: await count('recordColumns', { revisionId }),
    blocks: await count('recordBlocks', { revisionId }),
    drafts: await count('mendingDrafts', { revisionId }),
    fits: await count('fits', { revisionId }),
  });
  const nothing = { row: 0, columns: 0, blocks: 0, drafts: 0, fits: 0 };
  const pathOf = (name: string): string => join(service.services.config.dataFolder, 'uploads', name);
  const entries = (recordSetId: string) =>
    service.services.knex('journal').where({ subjectKind: 'record-set', subjectId: recordSetId }).orderBy('id');

  describe('changing a set', () => {
    it('changes its words and date, and the journal says what', async () => {
      const set = await bringIn();
      service.clock.advance(1000);
      const change = { name: ' Boats of the north ', description: 'Six years', retainUntil: '2027-06-30' };
      const changed = await analyst.patch(`/api/record-sets/${set.id}`).send({ ...change, changedAt: set.changedAt });
      expect(changed.status).toBe(200);
      expect(changed.body).toMatchObject({ ...change, name: 'Boats of the north' });
      expect(changed.body.changedAt > set.changedAt).toBe(true);
      expect((await entries(set.id)).at(-1)).toMatchObject({
        action: 'record-set-changed',
        actorId: analyst.person.id,
        summary: `The record set ${set.name}: it is called Boats of the north now; its description was changed; its rows are kept until 2027-06-30`,
      });
    });

    it('leaves what is absent alone, and null takes the date away', async () => {
      const set = await bringIn();
      await analyst.patch(`/api/record-sets/${set.id}`).send({ description: 'A', retainUntil: '2027-01-01' });
      const { body } = await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil: null });
      expect(body).toMatchObject({ name: set.name, description: 'A', retainUntil: null });
    });

    it('tells whoever comes second who was first, when, and what they changed', async () => {
      const set = await bringIn();
      service.clock.advance(90_000);
      await colleague
        .patch(`/api/record-sets/${set.id}`)
        .send({ description: 'By Odile', changedAt: set.changedAt })
        .expect(200);
      service.clock.advance(90_000);
      const late = await analyst
        .patch(`/api/record-sets/${set.id}`)
        .send({ description: 'By the other', changedAt: set.changedAt });
      expect([late.status, late.body.code]).toEqual([409, 'record-set-changed']);
      expect(late.body.detail).toContain('Odile Marsh changed it on 2026-11-03 at 09:');
      expect(late.body.detail).toContain('its description was changed');
      const { body } = await analyst.get(`/api/record-sets/${set.id}`);
      expect(body.description).toBe('By Odile');
      await analyst
        .patch(`/api/record-sets/${set.id}`)
        .send({ description: 'By both', changedAt: body.changedAt })
        .expect(200);
    });

    it('counts a revision that a colleague added as a change', async () => {
      const set = await bringIn();
      service.clock.advance(1000);
      await mend(set.revision.id);
      const late = await colleague.patch(`/api/record-sets/${set.id}`).send({ name: 'X', changedAt: set.changedAt });
      expect(late.body.code).toBe('record-set-changed');
      expect(late.body.detail).toContain('was mended from revision 1');
    });

    it('refuses a day in the past and a name in use, and changes nothing', async () => {
      const [set, other] = [await bringIn(), await bringIn()];
      const past = await analyst.patch(`/api/record-sets/${set.id}`).send({ name: 'New', retainUntil: '2026-11-02' });
      expect(past.status).toBe(400);
      expect(past.body.errors[0].pointer).toBe('#/retainUntil');
      await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil: '2026-11-03' }).expect(200);
      const taken = await analyst.patch(`/api/record-sets/${set.id}`).send({ name: other.name.toUpperCase() });
      expect([taken.status, taken.body.code]).toEqual([409, 'name-taken']);
      expect((await analyst.get(`/api/record-sets/${set.id}`)).body.name).toBe(set.name);
    });
  });

  describe('deleting a revision', () => {
    it('says what goes, then takes fits, drafts, columns, cells and row, and leaves what was made from it', async () => {
      const set = await bringIn();
      const first = set.revision.id;
      const second = await mend(first);
      const fitId = await fit(first);
      const steps = [{ kind: 'drop-repeated-rows' }];
      await analyst.put(`/api/record-revisions/${first}/mending-draft`).send({ steps }).expect(200);
      const outlook = await analyst.get(`/api/record-revisions/${first}/deletion`);
      expect(outlook.body).toEqual({
        ...{ revisionNumber: 1, rowCount, byteCount: boats.length, editions: [] },
        fits: [{ id: fitId, estimatorSlug: 'refit-labour', estimatorName: 'Refit labour' }],
        ...{ goesWithSet: false, originalGoes: false, basedOnIt: [2] },
      });
      await analyst.delete(`/api/record-revisions/${first}`).expect(204);
      expect(await left(first)).toEqual(nothing);
      expect(existsSync(pathOf(first))).toBe(true);
      await analyst.get(`/api/record-revisions/${first}`).expect(404);
      await analyst.get(`/api/fits/${fitId}`).expect(404);
      const { body } = await analyst.get(`/api/record-sets/${set.id}`).expect(200);
      expect(body.revisions).toMatchObject([{ id: second, number: 2, origin: 'mended', basedOn: null }]);
      const rows = await analyst.get(`/api/record-revisions/${second}/rows?limit=1`).expect(200);
      expect(rows.body.rows).toEqual([[7, 'steel', 90]]);
      await analyst.get(`/api/record-revisions/${second}/original`).expect(200);
      expect((await entries(set.id)).at(-1)).toMatchObject({
        action: 'record-revision-deleted',
        summary: `Revision 1 of ${set.name} was deleted with ${rowCount} rows, 1 fit`,
      });
    });

    it('takes the set and the original file along with the last one', async () => {
      const set = await bringIn();
      const path = pathOf(set.revision.id);
      expect(existsSync(path)).toBe(true);
      const outlook = await analyst.get(`/api/record-revisions/${set.revision.id}/deletion`);
      expect(outlook.body).toMatchObject({ goesWithSet: true, originalGoes: true });
      const before = readdirSync(join(service.services.config.dataFolder, 'uploads')).length;
      await analyst.delete(`/api/record-revisions/${set.revision.id}`).expect(204);
      expect(existsSync(path)).toBe(false);
      expect(readdirSync(join(service.services.config.dataFolder, 'uploads'))).toHaveLength(before - 1);
      expect(await left(set.revision.id)).toEqual(nothing);
      await analyst.get(`/api/record-sets/${set.id}`).expect(404);
      expect((await entries(set.id)).at(-1)?.summary).toContain('so the record set went too');
    });

    it('is refused while an edition of any state rests on it, which is named', async () => {
      const set = await bringIn();
      await draftEdition(await fit(set.revision.id));
      const outlook = await analyst.get(`/api/record-revisions/${set.revision.id}/deletion`);
      expect(outlook.body.editions).toMatchObject([{ estimatorSlug: 'refit-labour', estimatorName: 'Refit labour' }]);
      const refused = await analyst.delete(`/api/record-revisions/${set.revision.id}`);
      expect([refused.status, refused.body.code]).toEqual([409, 'revision-in-use']);
      expect(refused.body.detail).toContain(`edition ${outlook.body.editions[0].number} of Refit labour`);
      expect(await left(set.revision.id)).toMatchObject({ row: 1, columns: 3, blocks: 3, fits: 1 });
    });

    it('cancels a fit that runs, so that its thread never works on records that are gone', async () => {
      const set = await bringIn();
      const fitId = await startFit(set.revision.id);
      const stateOf = async (): Promise<string> => (await service.services.fits.progress(fitId)).state;
      while ((await stateOf()) === 'queued') await new Promise((resolve) => setTimeout(resolve, 5));
      expect(await stateOf()).toBe('running');
      const kept = jest.spyOn(FitQueueStore.prototype, 'finish');
      await analyst.delete(`/api/record-revisions/${set.revision.id}`).expect(204);
      expect(await left(set.revision.id)).toEqual(nothing);
      expect(kept).not.toHaveBeenCalled();
      kept.mockRestore();
      const about = await service.services.knex('journal').where({ subjectId: fitId }).orderBy('id').pluck('action');
      expect(about).toEqual(['fit-started', 'fit-cancelled']);
    });

    it('leaves only cells that nobody speaks of when it is cut short, which hinder no start and are swept', async () => {
      const set = await bringIn();
      const { cellStorage, knex } = service.services;
      const clear = jest.spyOn(cellStorage, 'clear').mockRejectedValueOnce(new Error('killed'));
      await analyst.delete(`/api/record-revisions/${set.revision.id}`).expect(204);
      expect(clear).toHaveBeenCalledTimes(1);
      clear.mockRestore();
      expect(await left(set.revision.id)).toEqual({ ...nothing, blocks: 3 });
      expect(await migrate(knex, migrationsFolder)).toEqual([]);
      await cellStorage.sweep(service.clock.now());
      expect(await left(set.revision.id)).toEqual(nothing);
    });

    it('is for analysts', async () => {
      const set = await bringIn();
      const viewer = await service.as('viewer');
      await viewer.delete(`/api/record-revisions/${set.revision.id}`).expect(403);
      await viewer.patch(`/api/record-sets/${set.id}`).send({ name: 'Mine' }).expect(403);
      await analyst.delete('/api/record-revisions/0000000000000000').expect(404);
    });
  });

  describe('the retention date', () => {
    const runJob = () => eraseRetainedRecords(service.services.retention).run();

    it('keeps the rows to the end of its day and erases them after it, in every revision', async () => {
      const set = await bringIn();
      const [first, second] = [set.revision.id, await mend(set.revision.id)];
      const fitId = await fit(first);
      const editionId = await draftEdition(fitId);
      const before = await analyst
        .post(`/api/editions/${editionId}/try`)
        .send({ inputs: { 'length (m)': 9, hull: 'oak' } });
      expect(before.status).toBe(200);
      const today = service.clock.now().toISOString().slice(0, 10);
      await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil: today }).expect(200);
      await runJob();
      expect((await left(first)).blocks).toBe(3);

      service.clock.advance(dayMs);
      await runJob();
      expect(await left(first)).toMatchObject({ row: 1, columns: 3, blocks: 0, drafts: 0, fits: 1 });
      expect((await left(second)).blocks).toBe(0);
      expect(existsSync(pathOf(first))).toBe(false);
      const stored = await service.services.knex('recordColumns').whereIn('revisionId', [first, second]);
      expect(JSON.stringify(stored)).not.toMatch(/oak|steel|wood|"histogram":"/);

      const { body } = await analyst.get(`/api/record-revisions/${second}`).expect(200);
      expect(body).toMatchObject({
        ...{ number: 2, rowCount, sha256: set.revision.sha256, createdBy: { id: analyst.person.id } },
        erasedAt: service.clock.now().toISOString(),
        mending: { from: first, steps: [] },
      });
      expect(body.columns.map(({ name, kind }: { name: string; kind: string }) => [name, kind])).toEqual([
        ['length (m)', 'numeric'],
        ['hull', 'category'],
        ['hours', 'numeric'],
      ]);
      const after = await analyst
        .post(`/api/editions/${editionId}/try`)
        .send({ inputs: { 'length (m)': 9, hull: 'oak' } });
      expect([after.status, after.body.value]).toEqual([200, before.body.value]);
      expect((await analyst.get(`/api/fits/${fitId}`)).body.revision).toMatchObject({ id: first, rowCount });
      expect((await entries(set.id)).at(-1)).toMatchObject({
        ...{ action: 'records-erased', actorId: null },
        summary: `The rows of 2 revisions of ${set.name} were erased, which were to be kept until ${today}`,
      });
    });

    it('leaves nothing of the rows in any file of the desk', async () => {
      const lines = Array.from(
        { length: 300 },
        (_, row) => `teal-${row}-${'q'.repeat(60)},${row % 2 ? 'widgeon' : 'pochard'},${row}`,
      );
      const set = await bringIn(`note,bird,hours\n${lines.join('\n')}\n`);
      const words: Record<string, string> = { widgeon: 'garganey' };
      const steps = [{ kind: 'map-levels', column: 'bird', levels: words }];
      await analyst.put(`/api/record-revisions/${set.revision.id}/mending-draft`).send({ steps }).expect(200);
      await mend(set.revision.id, steps);
      const found = () => {
        const files = readdirSync(service.services.config.dataFolder, { recursive: true, withFileTypes: true });
        const bytes = Buffer.concat(
          files.filter((file) => file.isFile()).map((file) => readFileSync(join(file.parentPath, file.name))),
        );
        return ['teal-7-', 'widgeon', 'pochard', 'garganey'].filter((word) => bytes.includes(word));
      };
      expect(found()).toHaveLength(4);
      const retainUntil = service.clock.now().toISOString().slice(0, 10);
      await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil }).expect(200);
      service.clock.advance(dayMs);
      await runJob();
      expect(found()).toEqual([]);
    });

    it('answers whoever reads erased rows that they are gone, whichever way they ask', async () => {
      const set = await bringIn();
      const { id } = set.revision;
      await analyst
        .patch(`/api/record-sets/${set.id}`)
        .send({ retainUntil: service.clock.now().toISOString().slice(0, 10) });
      service.clock.advance(dayMs);
      await runJob();
      const steps = [{ kind: 'drop-repeated-rows' }];
      const at = `/api/record-revisions/${id}`;
      const asked = {
        rows: () => analyst.get(`${at}/rows`),
        matching: () => analyst.get(`${at}/rows?where=hours%20%3E%201`),
        original: () => analyst.get(`${at}/original`),
        findings: () => analyst.get(`${at}/findings`),
        correlations: () => analyst.get(`${at}/correlations`),
        scatter: () => analyst.get(`${at}/scatter?x=hours&y=hours`),
        comparison: () => analyst.get(`${at}/comparison?with=${id}`),
        csv: () => analyst.get(`${at}/csv`),
        mending: () => analyst.post(`${at}/mended-revisions`).send({ steps }),
        trial: () => analyst.post(`${at}/mending-trial`).send({ steps }),
        draft: () => analyst.put(`${at}/mending-draft`).send({ steps }),
        fit: () => analyst.post('/api/estimators/refit-labour/fits').send({ revisionId: id, specification }),
      };
      const answers: Record<string, unknown> = {};
      for (const [what, ask] of Object.entries(asked)) {
        const { status, body } = await ask();
        answers[what] = [status, body.code];
      }
      const gone = [410, 'records-erased'];
      expect(answers).toEqual(Object.fromEntries(Object.keys(asked).map((what) => [what, gone])));
    });

    it('finishes what a killed process left, and does nothing twice', async () => {
      const set = await bringIn();
      const { id } = set.revision;
      const { knex } = service.services;
      await knex('recordRevisions').where({ id }).update({ erasedAt: service.clock.now().toISOString() });
      await runJob();
      expect((await left(id)).blocks).toBe(0);
      expect(existsSync(pathOf(id))).toBe(false);
      const told = (await entries(set.id)).length;
      await runJob();
      expect(await entries(set.id)).toHaveLength(told);
    });
  });
});
