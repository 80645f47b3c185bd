import { createHash } from 'node:crypto';
import { rmSync, truncateSync, type ReadStream } from 'node:fs';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { gzipSync } from 'node:zlib';
import { bringIn, keptOf, sendFile, uploadsOf } from '../support/incoming-file';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

const boats = 'length (m);hull;remark\n7,5;steel;dry\n9,25;oak;999\n8;steel;wet\n';
const hourMs = 60 * 60 * 1000;

describe('a file that has arrived', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  it('is answered with its facts and how it would be read, and does not count yet', async () => {
    const before = await keptOf(service);
    const file = await sendFile(analyst, boats, 'C:\\exports\\boats.csv');
    expect(file).toMatchObject({
      fileName: 'boats.csv',
      byteCount: Buffer.byteLength(boats),
      sha256: createHash('sha256').update(boats).digest('hex'),
      receivedAt: service.clock.now().toISOString(),
      keptUntil: new Date(service.clock.now().getTime() + 24 * hourMs).toISOString(),
      proposal: { fileKind: 'text', choices: { delimiter: ';', decimal: ',' }, complete: true, appending: null },
    });
    expect(file.proposal.columns.map(({ name, kind }) => [name, kind])).toEqual([
      ['length (m)', 'numeric'],
      ['hull', 'category'],
      ['remark', 'category'],
    ]);
    expect(file.proposal.written[0]).toEqual(['7,5', 'steel', 'dry']);
    expect(file.proposal.read[0]).toEqual([7.5, 'steel', 'dry']);
    expect((await analyst.get(`/api/incoming-files/${file.id}`)).body).toEqual(file);
    const { uploads, ...counts } = await keptOf(service);
    expect(uploads).toHaveLength((before['uploads'] as string[]).length + 1);
    expect(counts).toMatchObject({ recordSets: before['recordSets'], recordBlocks: before['recordBlocks'] });
  });

  it('is looked at again with other choices, which are not kept', async () => {
    const file = await sendFile(analyst, boats);
    const choices = { missingMarks: ['999'], columns: [{ name: 'remark', kind: 'text' }] };
    const answer = await analyst.post(`/api/incoming-files/${file.id}/proposal`).send(choices);
    expect(answer.status).toBe(200);
    expect(answer.body.choices).toMatchObject(choices);
    expect(answer.body.read[1]).toEqual([9.25, 'oak', null]);
    expect(answer.body.columns[2]).toMatchObject({ kind: 'text', missingCount: 1 });
    expect((await analyst.get(`/api/incoming-files/${file.id}`)).body).toEqual(file);
  });

  it('is not read by choices that do not fit it', async () => {
    const { id } = await sendFile(analyst, boats);
    const answer = await analyst.post(`/api/incoming-files/${id}/proposal`).send({ columns: [{ name: 'draught' }] });
    expect(answer.status).toBe(422);
    expect(answer.body.code).toBe('choices-invalid');
    await analyst.get(`/api/incoming-files/${id}`).expect(200);
  });

  it.each([
    ['gone', (path: string) => rmSync(path)],
    ['cut short', (path: string) => truncateSync(path, 5)],
  ])('is said to be lost when a crash has left its bytes %s, and its row goes', async (_how, harm) => {
    const as = { kind: 'record-set', name: 'Lost' };
    const asked = [
      (at: string) => analyst.get(at),
      (at: string) => analyst.post(`${at}/proposal`).send({}),
      (at: string) => analyst.post(`${at}/bring-in`).send({ choices: {}, as }),
    ];
    const before = await keptOf(service);
    for (const ask of asked) {
      const { id } = await sendFile(analyst, boats);
      const { path } = await service.services.knex('incomingFiles').where({ id }).first('path');
      harm(join(service.services.config.dataFolder, 'uploads', path));
      const { status, body } = await ask(`/api/incoming-files/${id}`);
      expect([status, body.code, body.detail]).toEqual([404, 'not-found', expect.stringContaining('Send it again')]);
      expect(await keptOf(service)).toEqual(before);
    }
  });

  it('can be let go although its bytes are gone', async () => {
    const { id } = await sendFile(analyst, boats);
    const { path } = await service.services.knex('incomingFiles').where({ id }).first('path');
    rmSync(join(service.services.config.dataFolder, 'uploads', path));
    await analyst.delete(`/api/incoming-files/${id}`).expect(204);
  });

  it('is its sender’s own: for everybody else there is none', async () => {
    const { id } = await sendFile(analyst, boats);
    const other = await service.as('analyst', 'administrator');
    const as = { kind: 'record-set', name: 'Not theirs' };
    const answers = [
      await other.get(`/api/incoming-files/${id}`),
      await other.post(`/api/incoming-files/${id}/proposal`).send({}),
      await other.post(`/api/incoming-files/${id}/bring-in`).send({ choices: {}, as }),
      await other.delete(`/api/incoming-files/${id}`),
    ];
    for (const { status, body } of answers) expect([status, body.code]).toEqual([404, 'not-found']);
    await analyst.get(`/api/incoming-files/${id}`).expect(200);
  });

  it('is taken from analysts only', async () => {
    const viewer = await service.as('viewer');
    const before = await keptOf(service);
    const refused = await viewer.post('/api/incoming-files').attach('file', Buffer.from(boats), 'boats.csv');
    expect(refused.body.code).toBe('not-permitted');
    expect(await keptOf(service)).toEqual(before);
  });

  it('is let go', async () => {
    const before = await keptOf(service);
    const { id } = await sendFile(analyst, boats);
    await analyst.delete(`/api/incoming-files/${id}`).expect(204);
    await analyst.get(`/api/incoming-files/${id}`).expect(404);
    await analyst.delete(`/api/incoming-files/${id}`).expect(404);
    expect(await keptOf(service)).toEqual(before);
  });

  const unreadable: readonly (readonly [string, string | Buffer, string])[] = [
    ['a document', '%PDF-1.7 and so on', 'file-not-table'],
    ['nothing', '', 'file-empty'],
    ['bytes that are no text', Buffer.from('a,b\n1,caf\xe9\n', 'latin1'), 'file-encoding'],
    ['a packed file that breaks off', gzipSync(boats.repeat(50)).subarray(0, 60), 'file-not-table'],
  ];
  it.each(unreadable)('is refused when it is %s, and nothing of it stays', async (_what, bytes, code) => {
    const before = await keptOf(service);
    const refused = await analyst.post('/api/incoming-files').attach('file', Buffer.from(bytes), 'boats.csv');
    expect([refused.status, refused.body.code]).toEqual([422, code]);
    expect(await keptOf(service)).toEqual(before);
  });

  it('goes by itself after a day, and not before', async () => {
    const before = await keptOf(service);
    const { id } = await sendFile(analyst, boats);
    service.clock.advance(23 * hourMs);
    await service.services.incomingSweep.removeOld();
    await analyst.get(`/api/incoming-files/${id}`).expect(200);
    service.clock.advance(2 * hourMs);
    await service.services.incomingSweep.removeOld();
    await analyst.get(`/api/incoming-files/${id}`).expect(404);
    expect((await keptOf(service))['uploads']).toHaveLength(0);
    expect(before['uploads']).not.toHaveLength(0);
  });

  it('stays while the folder is swept of what nobody knows, as originals do', async () => {
    const [waiting, original] = [await sendFile(analyst, boats), await sendFile(analyst, boats)];
    await bringIn(analyst, original, { kind: 'record-set', name: 'Swept around' });
    const before = uploadsOf(service);
    await service.services.incomingSweep.removeLeftBehind(new Date(Date.now() + 48 * hourMs));
    expect(uploadsOf(service)).toEqual(before);
    await service.services.knex('incomingFiles').where({ id: waiting.id }).delete();
    await service.services.incomingSweep.removeLeftBehind(new Date(Date.now() + 48 * hourMs));
    expect(uploadsOf(service)).toHaveLength(1);
  });
});

describe('a file that is too large', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService({ maximumFileBytes: 200_000 });
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  const rows = Buffer.from('a,b\n' + '1,2\n'.repeat(49_000));

  it('is refused by its length when that is told, and while it streams when not', async () => {
    const told = await analyst.post('/api/incoming-files').attach('file', Buffer.concat([rows, rows]), 'large.csv');
    expect([told.status, told.body.code]).toEqual([413, 'file-too-large']);
    const file = Readable.from([rows, rows]) as ReadStream;
    const streamed = await analyst.post('/api/incoming-files').attach('file', file, { filename: 'large.csv' });
    expect([streamed.status, streamed.body.code]).toEqual([413, 'file-too-large']);
    expect(uploadsOf(service)).toEqual([]);
  });
});
