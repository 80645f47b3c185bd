import { beginToBringIn, bringIn, keptOf, sendFile, uploadsOf, type IncomingFile } from '../support/incoming-file';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

const boats = 'length (m),hull,hours\n7.5,steel,10\n9.25,oak,12\n,steel,\n';
const numbered = (rowCount: number): string =>
  'row,hull,hours\n' + Array.from({ length: rowCount }, (_, row) => `${row},h${row % 7},${row / 8}\n`).join('');

describe('bringing in a file that has arrived', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());
  afterEach(() => jest.restoreAllMocks());

  const asSet = (name: string) => ({ kind: 'record-set', name }) as const;
  const revisionOf = async (id: string | null) => (await analyst.get(`/api/record-revisions/${String(id)}`)).body;
  const rowsOf = async (id: string | null) => (await analyst.get(`/api/record-revisions/${String(id)}/rows`)).body.rows;
  const newSet = async (name: string, text = boats) => {
    const task = await bringIn(analyst, await sendFile(analyst, text), asSet(name));
    return { id: String(task.recordSetId), revisionId: String(task.revisionId) };
  };
  const newestNote = () => service.services.knex('journal').orderBy('id', 'desc').first();

  it('makes a record set, read by the choices, and the file becomes its original', async () => {
    const file = await sendFile(analyst, boats);
    const as = { ...asSet(' Refits '), description: 'Of one yard', retainUntil: '2031-12-31' };
    const choices = { missingMarks: ['12'], columns: [{ name: 'length (m)', unit: 'ft' }] };
    const begun = await beginToBringIn(analyst, file, as, choices);
    expect(begun).toMatchObject({ kind: 'bring-in', recordSetId: null, revisionId: null });
    const task = await endOfTask(analyst, begun.id);
    expect(task).toMatchObject({ state: 'done', problem: null, progress: { stage: 'storing' } });
    const set = (await analyst.get(`/api/record-sets/${String(task.recordSetId)}`)).body;
    expect(set).toMatchObject({ name: 'Refits', description: 'Of one yard', retainUntil: '2031-12-31' });
    expect(set.revision).toMatchObject({
      ...{ id: task.revisionId, number: 1, origin: 'file', rowCount: 3, columnCount: 3 },
      ...{ sha256: file.sha256, byteCount: file.byteCount, fileName: 'boats.csv', originalKept: true },
      reading: { delimiter: ',', headerLine: 1, missingMarks: ['12'], setAside: [], unreadable: [] },
    });
    expect(set.revision.columns[0]).toMatchObject({ unit: 'ft' });
    expect(await rowsOf(task.revisionId)).toEqual([
      [7.5, 'steel', 10],
      [9.25, 'oak', null],
      [null, 'steel', null],
    ]);
    const original = await analyst.get(`/api/record-revisions/${String(task.revisionId)}/original`).buffer();
    expect((original.body as Buffer).toString()).toBe(boats);
    await analyst.get(`/api/incoming-files/${file.id}`).expect(404);
    expect(uploadsOf(service)).toEqual([task.revisionId]);
    expect(await newestNote()).toMatchObject({
      action: 'record-set-created',
      subjectId: task.recordSetId,
      summary: 'The record set Refits was brought in from boats.csv: 3 rows',
    });
  });

  it('makes the next revision of a set, and the set tells when it changed', async () => {
    const { id } = await newSet('Yearly');
    service.clock.advance(60_000);
    const as = { kind: 'revision', recordSetId: id, expectedNewest: 1 } as const;
    const task = await bringIn(analyst, await sendFile(analyst, `${boats}8,oak,11\n`, 'next.csv'), as);
    expect(await revisionOf(task.revisionId)).toMatchObject({ number: 2, rowCount: 4, origin: 'file', basedOn: null });
    const set = (await analyst.get(`/api/record-sets/${id}`)).body;
    expect(set.changedAt).toBe(service.clock.now().toISOString());
    expect(await newestNote()).toMatchObject({
      action: 'record-revision-added',
      summary: 'Revision 2 of Yearly was brought in from next.csv: 4 rows',
    });
  });

  it('appends the file’s rows to those of a revision, whose kinds and units hold', async () => {
    const { id, revisionId } = await newSet('Monthly');
    const month = 'hull,hours,length (m)\noak,1.5,850 cm\nlarch,2,9\n';
    const file = await sendFile(analyst, month, 'november.csv');
    const outlook = await analyst.post(`/api/incoming-files/${file.id}/proposal?appendTo=${revisionId}`).send({});
    expect(outlook.body.appending).toMatchObject({
      revision: { id: revisionId, number: 1, recordSetId: id, recordSetName: 'Monthly' },
      ...{ lacking: [], additional: [] },
    });
    const task = await bringIn(analyst, file, { kind: 'appended', revisionId, expectedNewest: 1 });
    expect(task).toMatchObject({ state: 'done' });
    expect(await revisionOf(task.revisionId)).toMatchObject({
      ...{ number: 2, origin: 'appended', rowCount: 5, appendedRowCount: 2, sha256: file.sha256, originalKept: true },
      ...{ basedOn: { id: revisionId, number: 1 }, fileName: 'november.csv' },
    });
    expect(await rowsOf(task.revisionId)).toEqual([
      [7.5, 'steel', 10],
      [9.25, 'oak', 12],
      [null, 'steel', null],
      [8.5, 'oak', 1.5],
      [9, 'larch', 2],
    ]);
    expect(await newestNote()).toMatchObject({
      action: 'record-revision-appended',
      summary: 'Revision 2 of Monthly is revision 1 with november.csv appended: 2 rows added, 5 rows in all',
    });
  });

  it('does not append a file that lacks columns, and names them', async () => {
    const { revisionId } = await newSet('Lacking');
    const file = await sendFile(analyst, 'hull,yard\noak,North\n');
    const before = await keptOf(service);
    const task = await bringIn(analyst, file, { kind: 'appended', revisionId });
    expect(task).toMatchObject({ state: 'failed', problem: { code: 'columns-differ' } });
    expect(task.problem?.detail).toContain('length (m)');
    expect(task.problem?.detail).toContain('hours');
    expect(await keptOf(service)).toEqual(before);
  });

  it('refuses before the work what can be known by then', async () => {
    const { id } = await newSet('Known');
    const file = await sendFile(analyst, boats);
    const refusals: readonly (readonly [object, number, string])[] = [
      [asSet(' KNOWN '), 409, 'name-taken'],
      [{ ...asSet('In the past'), retainUntil: '2020-01-01' }, 400, 'request-invalid'],
      [{ kind: 'revision', recordSetId: id, expectedNewest: 2 }, 409, 'record-set-changed'],
      [{ kind: 'revision', recordSetId: 'n0suchset' }, 404, 'not-found'],
      [{ kind: 'appended', revisionId: 'n0suchrevision' }, 404, 'not-found'],
    ];
    const before = await service.services.knex('recordTasks').count({ rows: '*' });
    for (const [as, status, code] of refusals) {
      const refused = await analyst.post(`/api/incoming-files/${file.id}/bring-in`).send({ choices: {}, as });
      expect([refused.status, refused.body.code]).toEqual([status, code]);
    }
    expect(await service.services.knex('recordTasks').count({ rows: '*' })).toEqual(before);
    await analyst.get(`/api/incoming-files/${file.id}`).expect(200);
  });

  it('takes no rows for a set whose last day has passed', async () => {
    const { id } = await newSet('Past its day');
    await service.services.knex('recordSets').where({ id }).update({ retainUntil: '2020-01-01' });
    const file = await sendFile(analyst, boats);
    const as = { kind: 'revision', recordSetId: id };
    const refused = await analyst.post(`/api/incoming-files/${file.id}/bring-in`).send({ choices: {}, as });
    expect(refused.body.code).toBe('records-erased');
  });

  it('fails with the file’s line and keeps the file, so that it can be tried again with other choices', async () => {
    const ragged = `${numbered(6000)}6000,h1\n`;
    const file = await sendFile(analyst, ragged);
    const before = await keptOf(service);
    expect(await bringIn(analyst, file, asSet('Ragged'))).toMatchObject({
      state: 'failed',
      problem: { code: 'file-ragged', line: 6002 },
    });
    expect(await keptOf(service)).toEqual(before);
    const wrong = await bringIn(analyst, file, asSet('Ragged'), { columns: [{ name: 'draught' }] });
    expect(wrong).toMatchObject({ state: 'failed', problem: { code: 'choices-invalid' } });
    expect(await keptOf(service)).toEqual(before);
    await analyst.get(`/api/incoming-files/${file.id}`).expect(200);
  });

  it('lets one of two people through, tells the other who was first, and keeps nothing of theirs but the file', async () => {
    const { id } = await newSet('Of two');
    const colleague = await service.signIn(await service.addPerson(['analyst'], { name: 'Ina Marrow' }));
    const [theirs, mine] = [await sendFile(colleague, boats), await sendFile(analyst, boats)];
    const as = { kind: 'revision', recordSetId: id, expectedNewest: 1 } as const;
    const [first, second] = [await beginToBringIn(colleague, theirs, as), await beginToBringIn(analyst, mine, as)];
    expect(await endOfTask(colleague, first.id)).toMatchObject({ state: 'done' });
    const overtaken = await endOfTask(analyst, second.id);
    expect(overtaken).toMatchObject({ state: 'failed', problem: { code: 'record-set-changed' } });
    expect(overtaken.problem?.detail).toContain('Ina Marrow added revision 2 to Of two');
    expect((await analyst.get(`/api/record-sets/${id}`)).body.revisions).toHaveLength(2);
    const again = await bringIn(analyst, mine, { ...as, expectedNewest: 2 });
    expect(await revisionOf(again.revisionId)).toMatchObject({ number: 3 });
  });

  it('gives a name to one of two sets that are brought in at once', async () => {
    const [one, two] = [await sendFile(analyst, boats), await sendFile(analyst, boats)];
    const [first, second] = [
      await beginToBringIn(analyst, one, asSet('Wanted')),
      await beginToBringIn(analyst, two, asSet('wanted')),
    ];
    expect(await endOfTask(analyst, first.id)).toMatchObject({ state: 'done' });
    const before = await keptOf(service);
    expect(await endOfTask(analyst, second.id)).toMatchObject({ state: 'failed', problem: { code: 'name-taken' } });
    expect(await keptOf(service)).toEqual(before);
    await analyst.get(`/api/incoming-files/${two.id}`).expect(200);
  });

  it('brings a file in once, however often it is asked to', async () => {
    const file = await sendFile(analyst, boats);
    const [first, second] = [
      await beginToBringIn(analyst, file, asSet('Once')),
      await beginToBringIn(analyst, file, asSet('Twice')),
    ];
    expect(await endOfTask(analyst, first.id)).toMatchObject({ state: 'done' });
    expect(await endOfTask(analyst, second.id)).toMatchObject({ state: 'failed', problem: { code: 'not-found' } });
  });

  it('puts the file’s time off while it is brought in', async () => {
    const file = await sendFile(analyst, boats);
    service.clock.advance(23 * 60 * 60 * 1000);
    const store = jest.spyOn(service.services.cellStorage, 'storeFor');
    store.mockImplementationOnce(async (...given) => {
      service.clock.advance(2 * 60 * 60 * 1000);
      await service.services.incomingSweep.removeOld();
      store.mockRestore();
      return service.services.cellStorage.storeFor(...given);
    });
    expect(await bringIn(analyst, file, asSet('Late in the day'))).toMatchObject({ state: 'done' });
  });

  describe('when it is cancelled', () => {
    let file: IncomingFile;
    let before: unknown;
    beforeEach(async () => {
      file = await sendFile(analyst, numbered(150_000));
      before = await keptOf(service);
    });

    const expectNothingKept = async (taskId: string) => {
      const task = await endOfTask(analyst, taskId);
      expect(task).toMatchObject({ state: 'cancelled', recordSetId: null, revisionId: null, problem: null });
      expect(await keptOf(service)).toEqual(before);
      await analyst.get(`/api/incoming-files/${file.id}`).expect(200);
    };
    const runningTask = async () => {
      // Inside a unit of work this joins it, as everything does.
      const { connection } = service.services.database;
      const row = (await connection('recordTasks').where({ state: 'running' }).first('id')) as { id: string };
      return row.id;
    };

    it('while it waits, nothing is kept', async () => {
      const ahead = await sendFile(analyst, numbered(20_000));
      const first = await beginToBringIn(analyst, ahead, asSet('Ahead'));
      const second = await beginToBringIn(analyst, file, asSet('Cancelled'));
      await analyst.post(`/api/record-tasks/${second.id}/cancel`).expect(202);
      expect(await endOfTask(analyst, second.id)).toMatchObject({ state: 'cancelled' });
      await endOfTask(analyst, first.id);
      await analyst.get(`/api/incoming-files/${file.id}`).expect(200);
    });

    it('while it is read, nothing is kept', async () => {
      const { id } = await beginToBringIn(analyst, file, asSet('Cancelled'));
      while ((await analyst.get(`/api/record-tasks/${id}`)).body.progress.stage === 'waiting');
      await analyst.post(`/api/record-tasks/${id}/cancel`).expect(202);
      await expectNothingKept(id);
    });

    it('while its cells are stored, nothing is kept', async () => {
      const { cellStorage, recordTasks } = service.services;
      const store = jest.spyOn(cellStorage, 'storeAhead');
      store.mockImplementation(async (revisionId, table, spillPath, options) => {
        store.mockRestore();
        let asked = false;
        const onProgress: NonNullable<typeof options>['onProgress'] = () => {
          if (!asked) void runningTask().then((id) => recordTasks.cancel(id));
          asked = true;
        };
        await cellStorage.storeAhead(revisionId, table, spillPath, { ...options, onProgress });
        // Stored before it heard: then the unit of work must not begin.
        while (!options?.signal?.aborted) await new Promise((resolve) => setImmediate(resolve));
      });
      const { id } = await beginToBringIn(analyst, file, asSet('Cancelled'));
      await expectNothingKept(id);
    });

    it('at its very last, nothing is kept', async () => {
      const { journal, recordTasks } = service.services;
      const write = jest.spyOn(journal, 'write');
      write.mockImplementation(async () => {
        write.mockRestore();
        await recordTasks.cancel(await runningTask());
      });
      const { id } = await beginToBringIn(analyst, file, asSet('Cancelled'));
      await expectNothingKept(id);
    });

    it('when the file is let go, nothing is kept at all', async () => {
      const { id } = await beginToBringIn(analyst, file, asSet('Let go'));
      while ((await analyst.get(`/api/record-tasks/${id}`)).body.progress.stage === 'waiting');
      await analyst.delete(`/api/incoming-files/${file.id}`).expect(204);
      expect(await endOfTask(analyst, id)).toMatchObject({ state: 'failed', problem: { code: 'not-found' } });
      const { uploads, recordBlocks } = await keptOf(service);
      expect(uploads).toHaveLength((before as { uploads: string[] }).uploads.length - 1);
      expect(recordBlocks).toBe((before as { recordBlocks: number }).recordBlocks);
    });
  });

  it('keeps nothing when the disk is full while cells are stored, and says so', async () => {
    const file = await sendFile(analyst, boats);
    const before = await keptOf(service);
    jest.spyOn(service.services.cellStorage, 'storeAhead').mockImplementation(async () => {
      throw Object.assign(new Error('database or disk is full'), { code: 'SQLITE_FULL' });
    });
    expect(await bringIn(analyst, file, asSet('Full'))).toMatchObject({
      state: 'failed',
      problem: { code: 'storage-full' },
    });
    expect(await keptOf(service)).toEqual(before);
  });
});
