import { createServer, get as httpGet, type IncomingMessage, type Server } from 'node:http';
import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { Worker } from 'node:worker_threads';
import type { components } from '../../openapi/types/desk';
import { endOfTask } from '../support/record-task';
import { startTestService, testPassword, type TestAgent, type TestService } from '../support/test-service';

type Revision = components['schemas']['RecordRevision'];

const boats = [
  'length (m),hull,launched,surveyed,draught,name',
  '7.5,steel,2019-04-01,2019-04-01T10:15:00Z,-0.25,"Heron, the grey"',
  ',"oak ""fumed""",2020-05-02,,1e-7,Plover',
  '12345678.125,steel,,2021-06-03T23:59:59.250Z,-3,"two\nlines"',
  '9,larch,2021-06-03,2021-06-03T00:00:00Z,,Étoile',
].join('\n');

describe('exporting a revision', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  async function bringIn(text: string | Buffer, name: string): Promise<Revision> {
    const answer = await analyst
      .post('/api/record-sets')
      .field('name', name)
      .attach('file', Buffer.from(text), 'boats.csv')
      .expect(201);
    return answer.body.revision as Revision;
  }
  const csvOf = (id: string) =>
    analyst
      .get(`/api/record-revisions/${id}/csv`)
      .buffer()
      .parse((response, done) => {
        const chunks: Buffer[] = [];
        response.on('data', (chunk: Buffer) => chunks.push(chunk));
        response.on('end', () => done(null, Buffer.concat(chunks)));
      })
      .expect(200);
  const rowsOf = async (id: string) => (await analyst.get(`/api/record-revisions/${id}/rows?limit=200`)).body.rows;

  it('gives a CSV file named for the set and the revision, which brought in again is the same table', async () => {
    const revision = await bringIn(boats, 'Boats: north/south');
    const exported = await csvOf(revision.id);
    expect(exported.headers['content-type']).toBe('text/csv; charset=utf-8');
    expect(exported.headers['content-disposition']).toBe('attachment; filename="Boats- north-south, revision 1.csv"');
    const bytes = exported.body as Buffer;
    expect([...bytes.subarray(0, 3)]).toEqual([0xef, 0xbb, 0xbf]);
    const again = await bringIn(bytes, 'Again');
    const facts = ({ columns }: Revision) =>
      columns.map(({ name, kind, unit, missingCount }) => ({ name, kind, unit, missingCount }));
    expect(facts(again)).toEqual(facts(revision));
    expect(facts(revision).map(({ kind }) => kind)).toEqual([
      ...['numeric', 'category', 'date', 'date', 'numeric', 'category'],
    ]);
    expect(await rowsOf(again.id)).toEqual(await rowsOf(revision.id));
  });

  it('does not let a name or a text be taken for a formula', async () => {
    const revision = await bringIn('a,b\n1,x\n2,y\n', 'Formulas');
    const steps = [
      { kind: 'rename', column: 'a', to: '@SUM(A1)' },
      { kind: 'map-levels', column: 'b', levels: { x: '=HYPERLINK("http://example")', y: '-2+3' } },
    ];
    const begun = await analyst
      .post(`/api/record-revisions/${revision.id}/mended-revisions`)
      .send({ steps })
      .expect(202);
    const { revisionId } = await endOfTask(analyst, begun.body.id);
    expect((await csvOf(revisionId as string)).body.toString('utf8')).toBe(
      `\uFEFF'@SUM(A1),b\r\n1,"'=HYPERLINK(""http://example"")"\r\n2,'-2+3\r\n`,
    );
  });

  it('writes every row of a table of several blocks', async () => {
    const count = 70_000;
    const lines = Array.from({ length: count }, (_, row) => `${row},${row % 5 === 0 ? '' : row % 7}`);
    const revision = await bringIn(`row,day\n${lines.join('\n')}\n`, 'Long');
    const text = ((await csvOf(revision.id)).body as Buffer).toString('utf8');
    expect(text === `\uFEFFrow,day\r\n${lines.join('\r\n')}\r\n`).toBe(true);
  });

  describe('to somebody who goes away', () => {
    let server: Server;
    beforeAll(async () => {
      server = createServer(service.app).listen(0);
      await once(server, 'listening');
    });
    afterAll(() => server.close());

    it('ends the thread that fills the file', async () => {
      const line = `${'x'.repeat(90)},${'1234567,'.repeat(8)}1\n`;
      const revision = await bringIn(`${'a,b,c,d,e,f,g,h,i,j'}\n${line.repeat(60_000)}`, 'Left');
      const ended = jest.spyOn(Worker.prototype, 'terminate');
      const { port } = server.address() as AddressInfo;
      const base = `http://127.0.0.1:${port}`;
      const signedIn = await fetch(`${base}/api/session`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify({ email: analyst.person.email, password: testPassword }),
      });
      const cookie = signedIn.headers.getSetCookie().map((one) => one.split(';')[0]);
      const asked = httpGet(`${base}/api/record-revisions/${revision.id}/csv`, {
        headers: { cookie: cookie.join('; ') },
      });
      const [answer] = (await once(asked, 'response')) as [IncomingMessage];
      await once(answer, 'data');
      expect(ended).not.toHaveBeenCalled();
      asked.on('error', () => undefined).destroy();
      while (ended.mock.calls.length === 0) await new Promise((resolve) => setTimeout(resolve, 10));
      expect(await ended.mock.results[0].value).toEqual(expect.any(Number));
      ended.mockRestore();
    });
  });
});
