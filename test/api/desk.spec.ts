import { newId } from '../../service/src/database/new-id';
import { startTestService, type TestAgent, type TestPerson, type TestService } from '../support/test-service';

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('the desk', () => {
  let service: TestService;
  let analyst: TestPerson;
  let administrator: TestAgent;
  let estimatorId: string;
  let revisionId: string;

  const insert = async (table: string, row: Record<string, unknown>): Promise<string> => {
    const id = newId();
    await service.services.knex(table).insert({ id, ...row });
    return id;
  };
  const made = () => ({ createdAt: service.clock.now().toISOString(), createdBy: analyst.id });
  const addFit = (state: string): Promise<string> => {
    service.clock.advance(1);
    return insert('fits', {
      estimatorId,
      revisionId,
      specification: '{}',
      state,
      stage: 'folds',
      stageDone: 3,
      stageTotal: 10,
      ...made(),
    });
  };
  const addEdition = async (number: number, state: string): Promise<string> => {
    const frozen = {
      formula: '{}',
      checksum: 'a'.repeat(64),
      inputSchema: '{}',
      cautions: '[]',
      method: 'ridge',
      rmse: 2.5,
      recordCount: 90,
      inputCount: 4,
    };
    return insert('editions', {
      estimatorId,
      number,
      fitId: await addFit('done'),
      state,
      changeNote: 'New records',
      ...frozen,
      ...made(),
    });
  };

  beforeAll(async () => {
    service = await startTestService();
    administrator = await service.as('administrator');
    analyst = await service.addPerson(['analyst'], { name: 'Ada Ferris' });
    const words = { description: '', intendedUse: '', notFor: '', cautions: '[]' };
    estimatorId = await insert('estimators', {
      slug: 'refit-labour',
      name: 'Refit labour',
      targetName: 'labour',
      unit: 'h',
      ...words,
      ...made(),
    });
    const recordSetId = await insert('recordSets', { name: 'Refits', nameKey: 'refits', description: '', ...made() });
    const file = {
      sha256: 'b'.repeat(64),
      rowCount: 90,
      columnCount: 5,
      byteCount: 900,
      fileName: 'refits.csv',
      originalPath: 'x',
      reading: '{}',
    };
    revisionId = await insert('recordRevisions', { recordSetId, number: 1, ...file, ...made() });
  });
  afterAll(() => service.close());

  const read = async (agent = administrator) => (await agent.get('/api/desk').expect(200)).body;
  const idsOf = (rows: readonly { id: string }[]): string[] => rows.map((row) => row.id);

  it('shows what is in force and what waits for review, and no other edition', async () => {
    await addEdition(1, 'superseded');
    const inForce = await addEdition(2, 'in-force');
    const waiting = await addEdition(3, 'under-review');
    await addEdition(4, 'draft');
    const desk = await read();
    expect(idsOf(desk.inForce)).toEqual([inForce]);
    expect(idsOf(desk.underReview)).toEqual([waiting]);
    expect(desk.underReview[0]).toMatchObject({
      number: 3,
      estimator: 'refit-labour',
      createdBy: { name: 'Ada Ferris' },
    });
  });

  it('shows fits under way, the oldest first, with how far they are', async () => {
    const queued = await addFit('queued');
    await addFit('cancelled');
    const running = await addFit('running');
    await addFit('failed');
    const { fitsUnderWay } = await read();
    expect(idsOf(fitsUnderWay)).toEqual([queued, running]);
    expect(fitsUnderWay[1]).toEqual({
      id: running,
      estimator: 'refit-labour',
      estimatorName: 'Refit labour',
      state: 'running',
      progress: { stage: 'folds', done: 3, total: 10 },
    });
  });

  it('counts estimates of today and of the last thirty days by the day in UTC', async () => {
    const [edition] = await service.services.knex('editions').where({ state: 'in-force' });
    const partner = await administrator.post('/api/partners').send({ name: 'Northquay', contactEmail: 'a@b.example' });
    const key = await administrator
      .post(`/api/partners/${partner.body.id}/keys`)
      .send({ kind: 'partner', label: 'Server' });
    const issuedAt = (time: string) =>
      insert('estimates', {
        estimatorId,
        editionId: edition.id,
        keyId: key.body.id,
        partnerId: partner.body.id,
        inputs: '{}',
        value: 1,
        flagCount: 0,
        answer: '{}',
        issuedAt: time,
      });
    // The test's clock stands at 2026-11-03.
    for (const time of [
      '2026-11-03T00:00:00.000Z',
      '2026-11-02T23:59:59.999Z',
      '2026-10-05T00:00:00.000Z',
      '2026-10-04T23:59:59.999Z',
    ])
      await issuedAt(time);
    expect(await read()).toMatchObject({ estimatesToday: 1, estimatesLast30Days: 3 });
  });

  it('tells administrators the ten newest entries and the others those of the desk’s own work', async () => {
    const { journal } = service.services;
    const write = (subjectKind: string) =>
      journal.write({
        actorId: analyst.id,
        action: 'tried',
        subjectKind,
        subjectId: null,
        summary: `About ${subjectKind}`,
      });
    for (let index = 0; index < 12; index += 1) await write('edition');
    for (const kind of ['person', 'key', 'partner', 'setting']) await write(kind);
    const viewer = await service.as('viewer');
    const whole = (await read()).recent;
    expect(whole).toHaveLength(10);
    expect(whole[1].summary).toBe('About setting');
    const own = (await read(viewer)).recent;
    expect(own).toHaveLength(10);
    expect(new Set(own.map((entry: { subjectKind: string }) => entry.subjectKind))).toEqual(new Set(['edition']));
  });

  it('stays shut to partner developers', async () => {
    const partner = await administrator
      .post('/api/partners')
      .send({ name: 'Outer Shoal', contactEmail: 'a@b.example' });
    const developer = await service.signIn(
      await service.addPerson(['partner-developer'], { partnerId: partner.body.id }),
    );
    await developer.get('/api/desk').expect(403);
  });
});
