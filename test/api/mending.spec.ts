import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import type { components } from '../../openapi/types/desk';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

type Step = components['schemas']['MendStep'];

const boats =
  'length (m),hull,launched,remark\n7.5,steel,2019-04-01,dry\n30,Steel,2020-05-02,\n9,oak,2021-06-03,wet\n9,oak,2021-06-03,wet\n';

describe('mending', () => {
  let service: TestService;
  let analyst: TestAgent;
  let colleague: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    [analyst, colleague] = [await service.as('analyst'), await service.as('analyst')];
  });
  afterAll(() => service.close());

  let made = 0;
  async function bringIn(text = boats): Promise<{ readonly setId: string; readonly id: string; readonly at: string }> {
    const { body } = await analyst
      .post('/api/record-sets')
      .field('name', `Boats ${++made}`)
      .attach('file', Buffer.from(text), 'boats.csv')
      .expect(201);
    return { setId: body.id, id: body.revision.id, at: `/api/record-revisions/${body.revision.id}` };
  }
  const count = async (table: string): Promise<number> =>
    Number((await service.services.knex(table).count({ n: '*' }).first())?.['n']);
  const uploads = () => readdirSync(join(service.services.config.dataFolder, 'uploads')).sort();

  describe('a trial', () => {
    it('tells what each step would do and how the columns would stand, and writes nothing', async () => {
      const { at } = await bringIn();
      const [before, tasks, files] = [await count('recordBlocks'), await count('recordTasks'), uploads()];
      const steps: Step[] = [
        { kind: 'map-levels', column: 'hull', levels: { Steel: 'steel' } },
        { kind: 'convert-unit', column: 'length (m)', factor: 0.3048, where: '[length (m)] > 20' },
        { kind: 'drop-repeated-rows' },
        { kind: 'set-missing', column: 'remark', rows: [1] },
        { kind: 'derive', name: 'twice', formula: '[length (m)] * 2', unit: 'm' },
        { kind: 'set-aside', column: 'launched' },
      ];
      const tried = await analyst.post(`${at}/mending-trial`).send({ steps });
      expect(tried.status).toBe(200);
      expect(tried.body).toEqual({
        rowCount: 3,
        effects: [
          { told: 'Mapped levels of hull (“Steel” to “steel”) in 1 row.', rowsConcerned: 1 },
          { told: 'Multiplied length (m) by 0.3048 in 1 row where [length (m)] > 20.', rowsConcerned: 1 },
          { told: 'Dropped 1 row that repeated an earlier one in every column.', rowsConcerned: 1 },
          { told: 'Set remark to missing in 1 row (listed by number).', rowsConcerned: 1 },
          { told: 'Added twice = [length (m)] * 2.', rowsConcerned: null },
          { told: 'Set the column launched aside.', rowsConcerned: null },
        ],
        columns: [
          { name: 'length (m)', kind: 'numeric', unit: 'm', missingCount: 0 },
          { name: 'hull', kind: 'category', unit: null, missingCount: 0 },
          { name: 'remark', kind: 'category', unit: null, missingCount: 2 },
          { name: 'twice', kind: 'numeric', unit: 'm', missingCount: 0 },
        ],
      });
      expect(await count('recordBlocks')).toBe(before);
      expect(uploads()).toEqual(files);
      expect(await count('recordTasks')).toBe(tasks);
    });

    it('points to the step that cannot be done, and a formula’s fault keeps its character', async () => {
      const { at } = await bringIn();
      const steps: Step[] = [{ kind: 'drop-repeated-rows' }, { kind: 'drop-rows', where: '[length (m)] > > 3' }];
      const refused = await analyst.post(`${at}/mending-trial`).send({ steps });
      expect(refused.status).toBe(400);
      expect(refused.body).toMatchObject({
        code: 'request-invalid',
        errors: [{ pointer: '#/steps/1', detail: expect.stringContaining('(at character 16)') }],
      });
      const beyond = await analyst.post(`${at}/mending-trial`).send({ steps: [{ kind: 'drop-rows', rows: [5] }] });
      expect(beyond.body.errors).toEqual([
        { pointer: '#/steps/0', detail: 'There is no row 5 at this step; the table has 4.' },
      ]);
    });

    it('takes row numbers as the table stands before the step', async () => {
      const { at } = await bringIn();
      const drop: Step = { kind: 'drop-rows', rows: [1] };
      const tried = await analyst
        .post(`${at}/mending-trial`)
        .send({ steps: [drop, drop, { kind: 'drop-rows', where: 'hull = "steel" or hull = "Steel"' }] });
      expect(tried.body.effects.map((effect: { rowsConcerned: number }) => effect.rowsConcerned)).toEqual([1, 1, 0]);
      const late = await analyst.post(`${at}/mending-trial`).send({ steps: [drop, { kind: 'drop-rows', rows: [4] }] });
      expect(late.body.errors[0].detail).toBe('There is no row 4 at this step; the table has 3.');
    });
  });

  describe('steps that list many rows', () => {
    const listing = (lists: number): Step[] =>
      Array.from({ length: lists }, () => ({
        kind: 'drop-rows',
        rows: Array.from({ length: 100_000 }, (_, row) => 900_000 + row),
      }));

    it('are kept in a draft, and refused by what they are about, not for their length', async () => {
      const { at } = await bringIn();
      const steps = listing(3);
      const kept = await analyst.put(`${at}/mending-draft`).send({ steps }).expect(200);
      expect(kept.body.steps).toEqual(steps);
      for (const where of ['mending-trial', 'mended-revisions']) {
        const { status, body } = await analyst.post(`${at}/${where}`).send({ steps });
        if (where === 'mending-trial')
          expect([status, body.detail]).toEqual([400, expect.stringContaining('no row 900000')]);
        else expect((await endOfTask(analyst, body.id)).problem?.detail).toContain('no row 900000');
      }
    });

    it('are refused above eight megabytes, with what to do instead, and other bodies above one', async () => {
      const { at, setId } = await bringIn();
      for (const send of [
        analyst.put(`${at}/mending-draft`).send({ steps: listing(13) }),
        analyst.post(`${at}/mending-trial`).send({ steps: listing(13) }),
      ]) {
        const { status, body } = await send;
        expect([status, body.code, body.detail]).toEqual([413, 'body-too-large', expect.stringContaining('condition')]);
      }
      const long = await analyst.patch(`/api/record-sets/${setId}`).send({ description: 'x'.repeat(1_100_000) });
      expect([long.status, long.body.code]).toEqual([413, 'body-too-large']);
      expect(long.body.detail).toContain('1 MB');
    });
  });

  describe('a draft', () => {
    const steps: Step[] = [{ kind: 'rename', column: 'hull', to: 'material' }];

    it('is each person’s own, survives until it is emptied, and keeps unfinished steps', async () => {
      const { at } = await bringIn();
      expect((await analyst.get(`${at}/mending-draft`)).body).toEqual({ steps: [], changedAt: null });
      const kept = await analyst.put(`${at}/mending-draft`).send({ steps });
      expect(kept.body).toEqual({ steps, changedAt: service.clock.now().toISOString() });
      const unfinished: Step[] = [...steps, { kind: 'drop-rows', where: 'hull =' }];
      await analyst.put(`${at}/mending-draft`).send({ steps: unfinished }).expect(200);
      expect((await colleague.get(`${at}/mending-draft`)).body.steps).toEqual([]);
      const again = await service.signIn(analyst.person);
      expect((await again.get(`${at}/mending-draft`)).body.steps).toEqual(unfinished);
      expect((await analyst.put(`${at}/mending-draft`).send({ steps: [] })).body).toEqual({
        steps: [],
        changedAt: null,
      });
      expect((await analyst.get(`${at}/mending-draft`)).body.changedAt).toBeNull();
      await analyst.get('/api/record-revisions/0000000000000000/mending-draft').expect(404);
    });

    it('goes when its mending is done, and only that person’s', async () => {
      const { at } = await bringIn();
      for (const person of [analyst, colleague]) await person.put(`${at}/mending-draft`).send({ steps }).expect(200);
      const begun = await analyst.post(`${at}/mended-revisions`).send({ steps }).expect(202);
      expect((await endOfTask(analyst, begun.body.id)).state).toBe('done');
      expect((await analyst.get(`${at}/mending-draft`)).body.changedAt).toBeNull();
      expect((await colleague.get(`${at}/mending-draft`)).body.steps).toEqual(steps);
    });

    it('stays when its mending fails', async () => {
      const { at } = await bringIn();
      const wrong: Step[] = [...steps, { kind: 'set-aside', column: 'hull' }];
      await analyst.put(`${at}/mending-draft`).send({ steps: wrong }).expect(200);
      const begun = await analyst.post(`${at}/mended-revisions`).send({ steps: wrong }).expect(202);
      expect(await endOfTask(analyst, begun.body.id)).toMatchObject({
        state: 'failed',
        revisionId: null,
        problem: { code: 'request-invalid', errors: [{ pointer: '#/steps/1' }] },
      });
      expect((await analyst.get(`${at}/mending-draft`)).body.steps).toEqual(wrong);
    });
  });

  describe('two people', () => {
    const steps: Step[] = [{ kind: 'drop-repeated-rows' }];

    it('are told when the other has added a revision since', async () => {
      const { at } = await bringIn();
      const first = await analyst.post(`${at}/mended-revisions`).send({ steps, expectedNewest: 1 }).expect(202);
      expect((await endOfTask(analyst, first.body.id)).state).toBe('done');
      const late = await colleague.post(`${at}/mended-revisions`).send({ steps, expectedNewest: 1 });
      expect([late.status, late.body.code]).toEqual([409, 'record-set-changed']);
      expect(late.body.detail).toContain(analyst.person.name);
      const knowing = await colleague.post(`${at}/mended-revisions`).send({ steps, expectedNewest: 2 }).expect(202);
      expect((await endOfTask(colleague, knowing.body.id)).state).toBe('done');
    });

    it('are told so too when both began at the same time', async () => {
      const { at, setId } = await bringIn();
      const begun = [
        await analyst.post(`${at}/mended-revisions`).send({ steps, expectedNewest: 1 }).expect(202),
        await colleague.post(`${at}/mended-revisions`).send({ steps, expectedNewest: 1 }).expect(202),
      ];
      const ends = await Promise.all(begun.map(({ body }) => endOfTask(analyst, body.id)));
      expect(ends.map((end) => end.problem?.code ?? end.state)).toEqual(['done', 'record-set-changed']);
      expect((await analyst.get(`/api/record-sets/${setId}`)).body.revisions).toHaveLength(2);
    });
  });

  describe('a mending that does not come through', () => {
    /** Long enough in its thread to be met there. */
    const many = (): string =>
      `a,b\n${Array.from({ length: 20_000 }, (_, row) => `${row},${(row * 7) % 1000}`).join('\n')}\n`;
    const steps: Step[] = Array.from({ length: 200 }, (_, at) => ({
      kind: 'derive',
      name: `c${at}`,
      formula: 'sqrt(a * a + b * b) / (1 + abs(a - b)) + log(1 + a) ^ 2',
    }));

    it('reports its steps, and leaves nothing when it is cancelled', async () => {
      const { id, at } = await bringIn(many());
      const [blocks, files] = [await count('recordBlocks'), uploads()];
      const begun = await analyst.post(`${at}/mended-revisions`).send({ steps }).expect(202);
      const task = async () => (await analyst.get(`/api/record-tasks/${begun.body.id}`)).body;
      let seen = await task();
      while (seen.progress.done === 0) {
        expect(['queued', 'running']).toContain(seen.state);
        seen = await task();
      }
      expect(seen.progress).toMatchObject({ stage: 'mending', total: 200 });
      await analyst.post(`/api/record-tasks/${begun.body.id}/cancel`).expect(202);
      expect((await endOfTask(analyst, begun.body.id)).state).toBe('cancelled');
      expect(await count('recordBlocks')).toBe(blocks);
      expect(uploads()).toEqual(files);
      expect(await service.services.knex('recordRevisions').where({ mendedFrom: id })).toEqual([]);
    });

    it('says what became of its records when they are deleted meanwhile', async () => {
      const { at } = await bringIn(many());
      const [blocks, files] = [await count('recordBlocks'), uploads()];
      const begun = await analyst.post(`${at}/mended-revisions`).send({ steps }).expect(202);
      await colleague.delete(at).expect(204);
      const end = await endOfTask(analyst, begun.body.id);
      expect(end).toMatchObject({ state: 'failed', problem: { code: 'not-found' } });
      expect(await count('recordBlocks')).toBe(blocks - 2);
      expect(uploads()).toHaveLength(files.length - 1);
    });
  });
});
