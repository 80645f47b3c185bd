import { readdirSync, type ReadStream } from 'node:fs';
import { request as httpRequest, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { keptOf } from '../support/incoming-file';
import { startTestService, testPassword, type TestAgent, type TestService } from '../support/test-service';

describe('an upload that does not come through', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService({ maximumFileBytes: 200_000 });
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  const keptFiles = () => readdirSync(join(service.services.config.dataFolder, 'uploads'));
  const rows = 'a,b\n' + '1,2\n'.repeat(49_000);

  it('is refused when the file is too large, and nothing of it stays', async () => {
    const refused = await analyst
      .post('/api/record-sets')
      .field('name', 'Large')
      .attach('file', Buffer.from(`${rows}${rows}`), 'large.csv');
    expect(refused.status).toBe(413);
    expect(refused.body.code).toBe('file-too-large');
    expect(keptFiles()).toEqual([]);
  });

  it('is refused while it streams when its length was not told beforehand', async () => {
    const file = Readable.from([Buffer.from(rows), Buffer.from(rows)]);
    const refused = await analyst
      .post('/api/record-sets')
      .field('name', 'Streamed')
      .attach('file', file as ReadStream, { filename: 'large.csv' });
    expect(refused.body.code).toBe('file-too-large');
    expect(keptFiles()).toEqual([]);
  });

  describe('when the client goes away', () => {
    const boundary = 'edge-of-part';
    let server: Server;
    beforeAll(() => void (server = service.app.listen(0)));
    afterAll(async () => {
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
    });

    const open = async (path: string) => {
      const { port } = server.address() as AddressInfo;
      const headers = await signedInHeaders(port, service);
      const type = { 'Content-Type': `multipart/form-data; boundary=${boundary}` };
      const request = httpRequest({ port, path, method: 'POST', headers: { ...headers, ...type } });
      return request.on('error', () => undefined);
    };
    const field = (head: string, text: string) =>
      `--${boundary}\r\nContent-Disposition: form-data; ${head}\r\n\r\n${text}`;
    const file = (text: string) => field('name="file"; filename="half.csv"', text);

    it.each(['/api/record-sets', '/api/incoming-files'])('half-way, %s leaves nothing', async (path) => {
      const request = await open(path);
      request.write(file(rows.slice(0, 100_000)));
      await until(() => keptFiles().length === 1);
      request.destroy();
      await until(() => keptFiles().length === 0);
    });

    it('while its file is brought in, the work is cancelled and leaves nothing', async () => {
      const before = await keptOf(service);
      const request = await open('/api/record-sets');
      request.end(`${field('name="name"', 'Left alone')}\r\n${file(rows)}\r\n--${boundary}--\r\n`);
      await until(() => keptFiles().some((name) => name.endsWith('.spill')));
      request.destroy();
      await until(() => keptFiles().length === 0);
      const task = await service.services.knex('recordTasks').orderBy('createdAt', 'desc').first('state');
      expect(task).toEqual({ state: 'cancelled' });
      expect(await keptOf(service)).toEqual(before);
    });
  });

  it('is refused to those who may only read', async () => {
    const viewer = await service.as('viewer');
    const refused = await viewer
      .post('/api/record-sets')
      .field('name', 'Viewer')
      .attach('file', Buffer.from('a,b\n1,2\n'), 'small.csv');
    expect(refused.body.code).toBe('not-permitted');
    expect(keptFiles()).toEqual([]);
  });
});

async function until(isTrue: () => boolean): Promise<void> {
  for (let round = 0; round < 500 && !isTrue(); round++) await new Promise((resolve) => setTimeout(resolve, 10));
  expect(isTrue()).toBe(true);
}

async function signedInHeaders(port: number, service: TestService): Promise<Record<string, string>> {
  const { email } = await service.addPerson(['analyst']);
  const answer = await fetch(`http://localhost:${port}/api/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify({ email, password: testPassword }),
  });
  const { csrfToken } = (await answer.json()) as { csrfToken: string };
  const cookie = answer.headers
    .getSetCookie()
    .map((line) => line.split(';')[0])
    .join('; ');
  return { Cookie: cookie, 'X-XSRF-TOKEN': csrfToken };
}
