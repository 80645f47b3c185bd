import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Writable } from 'node:stream';
import { gzipSync } from 'node:zlib';
import { pino } from 'pino';
import { databasePathOf } from '../../service/src/compose';
import { beginToBringIn, bringIn, keptOf, sendFile, uploadsOf } from '../support/incoming-file';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

/** Words that stand nowhere else. */
const skipper = 'Quillfeather';
const rows = Array.from({ length: 300 }, (_, row) => `${7 + row / 100};${skipper} ${row};steel\n`);
const withSkippers = `length (m);skipper;hull\n${rows.join('')}`;
const asSet = (name: string) => ({ kind: 'record-set', name }) as const;

/** Every byte of the data folder: the database with its log of writes, and the uploads. */
function bytesOf(service: TestService): Buffer {
  const { dataFolder } = service.services.config;
  const entries = readdirSync(dataFolder, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile());
  return Buffer.concat(entries.map((entry) => readFileSync(join(entry.parentPath, entry.name))));
}

describe('a column that is set aside', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  const choices = { columns: [{ name: 'skipper', setAside: true }] };

  it('leaves no byte of its cells in the database or among the uploads, and takes the original with it', async () => {
    const file = await sendFile(analyst, withSkippers);
    expect(bytesOf(service).includes(skipper)).toBe(true);
    await analyst.post(`/api/incoming-files/${file.id}/proposal`).send(choices).expect(200);
    const { revisionId } = await bringIn(analyst, file, asSet('Without names'), choices);
    const { body } = await analyst.get(`/api/record-revisions/${String(revisionId)}`);
    expect(body).toMatchObject({
      ...{ rowCount: 300, columnCount: 2, originalKept: false },
      ...{ sha256: file.sha256, byteCount: file.byteCount, fileName: file.fileName },
      reading: { setAside: ['skipper'] },
    });
    expect(body.columns.map((column: { name: string }) => column.name)).toEqual(['length (m)', 'hull']);
    expect(uploadsOf(service)).toEqual([]);
    expect(bytesOf(service).includes(skipper)).toBe(false);
  });

  it('is named in what is told of the reading, and nowhere else', async () => {
    const { knex, config } = service.services;
    await knex.raw('VACUUM INTO ?', [`${databasePathOf(config)}.copy`]);
    const live = readFileSync(`${databasePathOf(config)}.copy`, 'latin1');
    const readings = (await knex('recordRevisions').pluck('reading')) as string[];
    const inReadings = readings.join('').split('skipper').length - 1;
    // As what was chosen, and as what came of it.
    expect([inReadings, live.split('skipper').length - 1]).toEqual([2, 2]);
  });

  it('is told by the journal to have cost the original, which is answered as not kept', async () => {
    const note = await service.services.knex('journal').orderBy('id', 'desc').first();
    expect(note.summary).toBe(
      'The record set Without names was brought in from boats.csv: 300 rows; 1 column was set aside, so the file itself was not kept',
    );
    const { body: list } = await analyst.get('/api/record-sets');
    const original = await analyst.get(`/api/record-revisions/${list.items[0].revision.id}/original`);
    expect([original.status, original.body.code]).toEqual([410, 'original-not-kept']);
  });

  it('stays aside in the newer file that a script sends without looking', async () => {
    const { body: list } = await analyst.get('/api/record-sets');
    const newer = await analyst
      .post(`/api/record-sets/${list.items[0].id}/revisions`)
      .attach('file', Buffer.from(withSkippers), 'newer.csv');
    expect(newer.status).toBe(201);
    expect(newer.body).toMatchObject({ number: 2, columnCount: 2, originalKept: false });
    expect(bytesOf(service).includes(skipper)).toBe(false);
    const without = await analyst
      .post(`/api/record-sets/${list.items[0].id}/revisions`)
      .attach('file', Buffer.from('length (m);hull\n7;steel\n'), 'without.csv');
    expect(without.body).toMatchObject({ number: 3, columnCount: 2, originalKept: true });
  });

  it('leaves nothing of itself when the work fails or is cancelled, but in the file that waits', async () => {
    const file = await sendFile(analyst, `${withSkippers}${rows.join('').repeat(60)}1;2\n`);
    const before = await keptOf(service);
    expect(await bringIn(analyst, file, asSet('Ragged'), choices)).toMatchObject({ state: 'failed' });
    const { id } = await beginToBringIn(analyst, file, asSet('Cancelled'), choices);
    await analyst.post(`/api/record-tasks/${id}/cancel`);
    await endOfTask(analyst, id);
    expect(await keptOf(service)).toEqual(before);
    await analyst.delete(`/api/incoming-files/${file.id}`).expect(204);
    expect(bytesOf(service).includes(skipper)).toBe(false);
  });
});

describe('the log', () => {
  let service: TestService;
  let analyst: TestAgent;
  let lines = '';
  beforeAll(async () => {
    const stream = new Writable({ write: (chunk, _encoding, done) => void ((lines += String(chunk)), done()) });
    service = await startTestService({ log: pino({ level: 'trace' }, stream) });
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  it('holds no cell of a file, however bringing it in goes wrong', async () => {
    const send = (text: string | Buffer, name: string) =>
      analyst.post('/api/record-sets').field('name', name).attach('file', Buffer.from(text), 'boats.csv');
    await send(withSkippers, 'Well').expect(201);
    await send(`${withSkippers}1;"${skipper}\n`, 'Open quote').expect(422);
    await send(`${withSkippers}${skipper}\n`, 'Ragged').expect(422);
    await send(gzipSync(withSkippers).subarray(0, 700), 'Broken off').expect(422);
    await send(`${skipper};${skipper}\n1;2\n`, 'Header').expect(422);
    const refusal = "BEGIN SELECT RAISE(ABORT, 'refused by the test'); END";
    await service.services.knex.raw(`CREATE TRIGGER refuse_columns BEFORE INSERT ON record_columns ${refusal}`);
    await send(withSkippers, 'Fault of the service').expect(500);
    const file = await sendFile(analyst, withSkippers);
    expect(await bringIn(analyst, file, asSet('Fault of the task'))).toMatchObject({ state: 'failed' });
    expect(lines.split('refused by the test').length - 1).toBeGreaterThanOrEqual(2);
    expect(lines).not.toContain(skipper);
  });
});
