import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { eraseRetainedRecords } from '../../service/src/jobs/erase-retained-records';
import { boatCount, boatSpecification, openBoatDesk, type BoatDesk } from '../support/boat-desk';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

const dayMs = 24 * 60 * 60 * 1000;

describe('the retention date', () => {
  let service: TestService;
  let analyst: TestAgent;
  let desk: BoatDesk;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
    desk = await openBoatDesk(service, analyst);
  });
  afterAll(() => service.close());

  const runJob = () => eraseRetainedRecords(service.services.retention).run();

  it('keeps the rows to the end of its day and erases them after it, in every revision', async () => {
    const set = await desk.bringIn();
    const [first, second] = [set.revision.id, await desk.mend(set.revision.id)];
    const fitId = await desk.fit(first);
    const editionId = await desk.draftEdition(fitId);
    const before = await analyst
      .post(`/api/editions/${editionId}/try`)
      .send({ inputs: { 'length (m)': 9, hull: 'oak' } });
    expect(before.status).toBe(200);
    const today = service.clock.now().toISOString().slice(0, 10);
    await analyst.patch(`/api/record-sets/${set.id}`).send({ retainUntil: today }).expect(200);
    await runJob();
    expect((await desk.left(first)).blocks).toBe(3);

    service.clock.advance(dayMs);
    await runJob();
    expect(await desk.left(first)).toMatchObject({ row: 1, columns: 3, blocks: 0, drafts: 0, fits: 1 });
    expect((await desk.left(second)).blocks).toBe(0);
    expect(existsSync(desk.pathOf(first))).toBe(false);
    const stored = await service.services.knex('recordColumns').whereIn('revisionId', [first, second]);
    expect(JSON.stringify(stored)).not.toMatch(/oak|steel|wood|"histogram":"/);

    const { body } = await analyst.get(`/api/record-revisions/${second}`).expect(200);
    expect(body).toMatchObject({
      ...{ number: 2, rowCount: boatCount, sha256: set.revision.sha256, createdBy: { id: analyst.person.id } },
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
    expect((await analyst.get(`/api/fits/${fitId}`)).body.revision).toMatchObject({ id: first, rowCount: boatCount });
    expect((await desk.journalOf(set.id)).at(-1)).toMatchObject({
      ...{ action: 'records-erased', actorId: null },
      summary: `The rows of 2 revisions of ${set.name} were erased, which were to be kept until ${today}`,
    });
  });

  it('leaves nothing of the rows in any file of the desk', async () => {
    const lines = Array.from(
      { length: 300 },
      (_, row) => `teal-${row}-${'q'.repeat(60)},${row % 2 ? 'widgeon' : 'pochard'},${row}`,
    );
    const set = await desk.bringIn(`note,bird,hours\n${lines.join('\n')}\n`);
    const words: Record<string, string> = { widgeon: 'garganey' };
    const steps = [{ kind: 'map-levels', column: 'bird', levels: words }];
    await analyst.put(`/api/record-revisions/${set.revision.id}/mending-draft`).send({ steps }).expect(200);
    await desk.mend(set.revision.id, steps);
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
    const set = await desk.bringIn();
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
      fit: () =>
        analyst.post('/api/estimators/refit-labour/fits').send({ revisionId: id, specification: boatSpecification }),
    };
    const answers: Record<string, unknown> = {};
    for (const [what, ask] of Object.entries(asked)) {
      const { status, body } = await ask();
      answers[what] = [status, body.code];
    }
    const gone = [410, 'records-erased'];
    expect(answers).toEqual(Object.fromEntries(Object.keys(asked).map((what) => [what, gone])));
  });

  it('fails a fit whose rows are erased before it reads them, even while their cells still lie there', async () => {
    const { knex, fitRunner, fits } = service.services;
    const set = await desk.bringIn();
    const held = jest.spyOn(fitRunner, 'wake').mockImplementation(() => undefined);
    const id = await desk.startFit(set.revision.id);
    await knex('recordRevisions')
      .where({ id: set.revision.id })
      .update({ erasedAt: service.clock.now().toISOString() });
    held.mockRestore();
    fitRunner.wake();
    expect(await fits.waitFor(id)).toBe('failed');
    const { body } = await analyst.get(`/api/fits/${id}`).expect(200);
    expect(body.failure).toMatchObject({
      code: 'records-erased',
      message: expect.stringContaining('another revision'),
    });
  });

  it('finishes what a killed process left, and does nothing twice', async () => {
    const set = await desk.bringIn();
    const { id } = set.revision;
    const { knex } = service.services;
    await knex('recordRevisions').where({ id }).update({ erasedAt: service.clock.now().toISOString() });
    await runJob();
    expect((await desk.left(id)).blocks).toBe(0);
    expect(existsSync(desk.pathOf(id))).toBe(false);
    const told = (await desk.journalOf(set.id)).length;
    await runJob();
    expect(await desk.journalOf(set.id)).toHaveLength(told);
  });
});
