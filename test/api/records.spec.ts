import { readdirSync, rmSync } from 'node:fs';
import { createHash } from 'node:crypto';
import { join } from 'node:path';
import { databasePathOf } from '../../service/src/compose';
import { readRecordTable } from '../../service/src/records/record-table-reader';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

const boats = [
  'length (m),hull,launched,remark',
  '7.5,steel,2019-04-01,dry',
  '9.25,oak,2020-05-02,NA',
  ',steel,,wet',
].join('\n');

describe('bringing in records', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  const upload = (text: string | Buffer, name: string, fileName = 'boats.csv') =>
    analyst.post('/api/record-sets').field('name', name).attach('file', Buffer.from(text), fileName);
  const keptFiles = () => readdirSync(join(service.services.config.dataFolder, 'uploads'));

  it('answers the columns with their kinds, units and figures', async () => {
    const answer = await upload(boats, 'Boats');
    expect(answer.status).toBe(201);
    const { revision } = answer.body;
    expect(revision).toMatchObject({ number: 1, rowCount: 3, columnCount: 4, fileName: 'boats.csv' });
    expect(revision.sha256).toBe(createHash('sha256').update(boats).digest('hex'));
    expect(revision.columns.map((column: { name: string; kind: string }) => [column.name, column.kind])).toEqual([
      ['length (m)', 'numeric'],
      ['hull', 'category'],
      ['launched', 'date'],
      ['remark', 'category'],
    ]);
    expect(revision.columns[0]).toMatchObject({
      unit: 'm',
      missingCount: 1,
      distinctCount: 2,
      minimum: 7.5,
      maximum: 9.25,
      mean: 8.375,
      standardDeviation: 0.875,
    });
    expect(revision.columns[1].levels).toEqual([
      { value: 'steel', count: 2 },
      { value: 'oak', count: 1 },
    ]);
    expect(revision.columns[3].missingCount).toBe(1);
  });

  it('takes text fields that stand after the file', async () => {
    const answer = await analyst
      .post('/api/record-sets')
      .attach('file', Buffer.from(boats), 'late.csv')
      .field('name', 'Late name');
    expect(answer.status).toBe(201);
    expect(answer.body.name).toBe('Late name');
  });

  it('gives rows as they were read and the original byte for byte', async () => {
    const { revision } = (await upload(boats, 'Rows')).body;
    const rows = await analyst.get(`/api/record-revisions/${revision.id}/rows?limit=2&offset=1`);
    expect(rows.body).toEqual({
      total: 3,
      offset: 1,
      columns: ['length (m)', 'hull', 'launched', 'remark'],
      numbers: [2, 3],
      rows: [
        [9.25, 'oak', '2020-05-02', null],
        [null, 'steel', null, 'wet'],
      ],
    });
    const original = await analyst
      .get(`/api/record-revisions/${revision.id}/original`)
      .buffer()
      .parse((response, done) => {
        const chunks: Buffer[] = [];
        response.on('data', (chunk: Buffer) => chunks.push(chunk));
        response.on('end', () => done(null, Buffer.concat(chunks)));
      });
    expect(original.headers['content-disposition']).toBe('attachment; filename=boats.csv');
    expect((original.body as Buffer).toString()).toBe(boats);
  });

  it('says of an original that is missing from the disk that it is', async () => {
    const { revision } = (await upload(boats, 'Missing original')).body;
    rmSync(join(service.services.config.dataFolder, 'uploads', revision.id));
    const answer = await analyst.get(`/api/record-revisions/${revision.id}/original`);
    expect([answer.status, answer.body.code]).toEqual([404, 'not-found']);
    expect(answer.body.detail).toContain('exported as CSV');
    expect(answer.headers['content-disposition']).toBeUndefined();
  });

  it('reads a revision back as the engine’s table', async () => {
    const { revision } = (await upload(boats, 'Table')).body;
    const table = readRecordTable(databasePathOf(service.services.config), revision.id, ['hull', 'length (m)']);
    expect(table).toEqual({
      rowCount: 3,
      columns: [
        { name: 'hull', kind: 'category', codes: Int32Array.of(0, 1, 0), levels: ['steel', 'oak'] },
        { name: 'length (m)', kind: 'numeric', unit: 'm', values: Float64Array.of(7.5, 9.25, NaN) },
      ],
    });
  });

  it('answers what to look at in a revision, with its rows', async () => {
    const rows = Array.from(
      { length: 40 },
      (_, row) => `${row + 5},${row % 3 ? 'oak' : 'Oak'},${(row * 37) % 41},same`,
    );
    const { revision } = (await upload(`length,hull,count,yard\n${rows.join('\n')}\n${rows[4]}\n`, 'Findings')).body;
    const found = await analyst.get(`/api/record-revisions/${revision.id}/findings?target=length`);
    expect(found.status).toBe(200);
    expect(found.body).toMatchObject({ revisionId: revision.id, target: 'length' });
    expect(found.body.items).toEqual(
      expect.arrayContaining([
        expect.objectContaining({ kind: 'repeated-rows', rows: [41] }),
        expect.objectContaining({ kind: 'levels-alike', columns: ['hull'] }),
        expect.objectContaining({ kind: 'constant-column', columns: ['yard'] }),
      ]),
    );
    const refused = await analyst.get(`/api/record-revisions/${revision.id}/findings?target=hull`);
    expect(refused.body.code).toBe('request-invalid');
  });

  it('mends a revision into the next one, which says how, and leaves the first as it is', async () => {
    const { id, revision } = (
      await upload('length (m),hull,hours\n7.5,steel,10\n30,Steel,12\n9,oak,\n9,oak,\n', 'Mended')
    ).body;
    const steps = [
      { kind: 'convert-unit', column: 'length (m)', factor: 0.3048, where: '[length (m)] > 20' },
      { kind: 'map-levels', column: 'hull', levels: { Steel: 'steel' } },
      { kind: 'drop-repeated-rows' },
      { kind: 'derive', name: 'hours per metre', formula: 'hours / [length (m)]', unit: 'h/m' },
    ];
    const begun = await analyst.post(`/api/record-revisions/${revision.id}/mended-revisions`).send({ steps });
    expect(begun.status).toBe(202);
    const task = await endOfTask(analyst, begun.body.id);
    expect(task).toMatchObject({ kind: 'mend', state: 'done', recordSetId: id });
    const mended = await analyst.get(`/api/record-revisions/${task.revisionId}`);
    expect(mended.body).toMatchObject({
      number: 2,
      rowCount: 3,
      columnCount: 4,
      sha256: revision.sha256,
      mending: { from: revision.id, steps },
    });
    expect(mended.body.mending.changes[0]).toBe('Multiplied length (m) by 0.3048 in 1 row where [length (m)] > 20.');
    const rows = await analyst.get(`/api/record-revisions/${mended.body.id}/rows`);
    expect(rows.body.rows).toEqual([
      [7.5, 'steel', 10, 10 / 7.5],
      [30 * 0.3048, 'steel', 12, 12 / (30 * 0.3048)],
      [9, 'oak', null, null],
    ]);
    expect((await analyst.get(`/api/record-revisions/${revision.id}`)).body).toMatchObject({
      rowCount: 4,
      mending: null,
    });
    expect((await analyst.get(`/api/record-sets/${id}`)).body.revision.number).toBe(2);
    const kept = keptFiles();
    const wrong = await analyst
      .post(`/api/record-revisions/${revision.id}/mended-revisions`)
      .send({ steps: [steps[1], { kind: 'drop-rows', where: 'lenght > 2' }] });
    expect(await endOfTask(analyst, wrong.body.id)).toMatchObject({
      state: 'failed',
      revisionId: null,
      problem: { code: 'request-invalid', errors: [{ pointer: '#/steps/1' }] },
    });
    expect(keptFiles()).toEqual(kept);
  });

  it('numbers the revisions of a set and keeps the older ones', async () => {
    const set = (await upload(boats, 'Yearly')).body;
    const second = await analyst
      .post(`/api/record-sets/${set.id}/revisions`)
      .attach('file', Buffer.from(`${boats}\n8,oak,2021-01-01,dry`), 'next.csv');
    expect(second.status).toBe(201);
    expect(second.body).toMatchObject({ number: 2, rowCount: 4, recordSetName: 'Yearly' });
    const detail = await analyst.get(`/api/record-sets/${set.id}`);
    expect(detail.body.revisions.map((revision: { number: number }) => revision.number)).toEqual([2, 1]);
    expect(detail.body.revision.rowCount).toBe(4);
    const list = await analyst.get('/api/record-sets?limit=200');
    expect(list.body.items.find((item: { id: string }) => item.id === set.id)).toMatchObject({
      revisionCount: 2,
      revision: { number: 2 },
    });
  });

  it('refuses a name that is in use, however it is written', async () => {
    await upload(boats, 'Taken');
    const kept = keptFiles();
    const refused = await upload(boats, ' taken ');
    expect(refused.status).toBe(409);
    expect(refused.body.code).toBe('name-taken');
    expect(keptFiles()).toEqual(kept);
  });

  const broken: readonly (readonly [string, string | Buffer, string, number | undefined])[] = [
    ['a ragged row', 'a,b\n1,2\n3\n', 'file-ragged', 3],
    ['two equal headers', 'a,b,a\n1,2,3\n', 'file-header', 1],
    ['an unnamed column', '\n\na,,c\n1,2,3\n', 'file-header', 3],
    ['numbers for a header', '1,2\n3,4\n', 'file-header', 1],
    ['no rows', 'a,b\n', 'file-empty', 1],
    ['nothing', '', 'file-empty', 1],
    ['a byte that is not UTF-8', Buffer.from('a,b\n1,x\n2,caf\xe9\n', 'latin1'), 'file-encoding', 3],
    ['a NUL byte', 'a,b\n1,2\n3,\0\n', 'file-not-table', 3],
    ['a workbook', Buffer.from([0x50, 0x4b, 3, 4, 20, 0, 6, 0]), 'file-not-table', 1],
    ['a web page', '<!doctype html><html><body>Sign in</body></html>', 'file-not-table', 1],
    ['a quotation mark left open', 'a,b\n1,2\n3,"x\n4,5\n', 'file-ragged', 3],
  ];
  it.each(broken)('refuses %s with its line, and keeps nothing', async (_what, text, code, line) => {
    const kept = keptFiles();
    const refused = await upload(text, `Broken ${code} ${String(line)}`);
    expect(refused.body).toMatchObject({ code, line });
    expect(refused.status).toBe(422);
    expect(keptFiles()).toEqual(kept);
  });

  it('asks for the file, and for a name', async () => {
    const noFile = await analyst.post('/api/record-sets').field('name', 'No file');
    expect(noFile.body.code).toBe('file-missing');
    const noName = await analyst.post('/api/record-sets').attach('file', Buffer.from(boats), 'boats.csv');
    expect(noName.body).toMatchObject({ code: 'request-invalid', errors: [{ pointer: '#/name' }] });
    const json = await analyst.post('/api/record-sets').send({ name: 'JSON' });
    expect(json.body.code).toBe('media-type-unsupported');
  });
});
