import { newId } from '../../service/src/database/new-id';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

/**
 * Fuel consumption and ten aspects of design of 32 motor cars: Henderson and Velleman 1981, "Building multiple
 * regression models interactively", Biometrics 37, 391-411; as R 4.2.2 has them (datasets::mtcars), without names.
 */
const mtcars = `mpg,cyl,disp,hp,drat,wt,qsec,vs,am,gear,carb
21,6,160,110,3.9,2.62,16.46,0,1,4,4
21,6,160,110,3.9,2.875,17.02,0,1,4,4
22.8,4,108,93,3.85,2.32,18.61,1,1,4,1
21.4,6,258,110,3.08,3.215,19.44,1,0,3,1
18.7,8,360,175,3.15,3.44,17.02,0,0,3,2
18.1,6,225,105,2.76,3.46,20.22,1,0,3,1
14.3,8,360,245,3.21,3.57,15.84,0,0,3,4
24.4,4,146.7,62,3.69,3.19,20,1,0,4,2
22.8,4,140.8,95,3.92,3.15,22.9,1,0,4,2
19.2,6,167.6,123,3.92,3.44,18.3,1,0,4,4
17.8,6,167.6,123,3.92,3.44,18.9,1,0,4,4
16.4,8,275.8,180,3.07,4.07,17.4,0,0,3,3
17.3,8,275.8,180,3.07,3.73,17.6,0,0,3,3
15.2,8,275.8,180,3.07,3.78,18,0,0,3,3
10.4,8,472,205,2.93,5.25,17.98,0,0,3,4
10.4,8,460,215,3,5.424,17.82,0,0,3,4
14.7,8,440,230,3.23,5.345,17.42,0,0,3,4
32.4,4,78.7,66,4.08,2.2,19.47,1,1,4,1
30.4,4,75.7,52,4.93,1.615,18.52,1,1,4,2
33.9,4,71.1,65,4.22,1.835,19.9,1,1,4,1
21.5,4,120.1,97,3.7,2.465,20.01,1,0,3,1
15.5,8,318,150,2.76,3.52,16.87,0,0,3,2
15.2,8,304,150,3.15,3.435,17.3,0,0,3,2
13.3,8,350,245,3.73,3.84,15.41,0,0,3,4
19.2,8,400,175,3.08,3.845,17.05,0,0,3,2
27.3,4,79,66,4.08,1.935,18.9,1,1,4,1
26,4,120.3,91,4.43,2.14,16.7,0,1,5,2
30.4,4,95.1,113,3.77,1.513,16.9,1,1,5,2
15.8,8,351,264,4.22,3.17,14.5,0,1,5,4
19.7,6,145,175,3.62,2.77,15.5,0,1,5,6
15,8,301,335,3.54,3.57,14.6,0,1,5,8
21.4,4,121,109,4.11,2.78,18.6,1,1,4,2
`;

describe('looking at a revision', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  async function bringIn(text: string, name: string): Promise<{ setId: string; id: string }> {
    const answer = await analyst
      .post('/api/record-sets')
      .field('name', name)
      .attach('file', Buffer.from(text), 'boats.csv');
    expect(answer.status).toBe(201);
    return { setId: answer.body.id, id: answer.body.revision.id };
  }
  async function revise(setId: string, text: string): Promise<string> {
    const answer = await analyst
      .post(`/api/record-sets/${setId}/revisions`)
      .attach('file', Buffer.from(text), 'boats.csv');
    expect(answer.status).toBe(201);
    return answer.body.revision?.id ?? answer.body.id;
  }
  const get = (id: string, what: string, query: Record<string, string | number> = {}) =>
    analyst.get(`/api/record-revisions/${id}/${what}`).query(query);

  describe('the rows behind a figure', () => {
    let id: string;
    beforeAll(async () => {
      const lines = Array.from({ length: 300 }, (_, row) => {
        const length = row % 50 === 7 ? '' : (5 + (row % 20) / 2).toFixed(1);
        return `${length},${row % 3 === 0 ? '"3"" planks"' : 'steel'},2020-01-${String(1 + (row % 28)).padStart(2, '0')},note ${row}`;
      });
      ({ id } = await bringIn(`length [m],hull,launched,note\n${lines.join('\n')}\n`, 'Rows behind'));
    });

    it('are those that meet a condition, with their numbers and how many there are', async () => {
      const { body } = await get(id, 'rows', { where: '[length [m]]] > 14 and hull = "3"" planks"', limit: 2 });
      expect(body).toEqual({
        total: 5,
        offset: 0,
        columns: ['length [m]', 'hull', 'launched', 'note'],
        numbers: [40, 100],
        rows: [
          [14.5, '3" planks', '2020-01-12', 'note 39'],
          [14.5, '3" planks', '2020-01-16', 'note 99'],
        ],
      });
      const second = await get(id, 'rows', {
        where: '[length [m]]] > 14 and hull = "3"" planks"',
        limit: 2,
        offset: 4,
      });
      expect(second.body).toMatchObject({ total: 5, offset: 4, numbers: [280] });
    });

    it('are those of the numbers given, each once and in their order; or both', async () => {
      const listed = await get(id, 'rows', { numbers: '9,8,300,9' });
      expect(listed.body).toMatchObject({ total: 3, numbers: [8, 9, 300] });
      expect(listed.body.rows.map((row: unknown[]) => row[3])).toEqual(['note 7', 'note 8', 'note 299']);
      const both = await get(id, 'rows', { numbers: '9,8,300', where: '[length [m]]] is missing' });
      expect(both.body).toMatchObject({ total: 1, numbers: [8], rows: [[null, 'steel', '2020-01-08', 'note 7']] });
    });

    it('are none where no row meets the condition', async () => {
      const { body } = await get(id, 'rows', { where: 'launched > "2021-01-01"' });
      expect(body).toMatchObject({ total: 0, numbers: [], rows: [] });
    });

    it('stay the same rows over pages, and past the last one there are none', async () => {
      const numbers: number[] = [];
      for (let offset = 0; offset <= 200; offset += 50) {
        const { body } = await get(id, 'rows', { where: 'hull <> "steel"', limit: 50, offset });
        expect(body.total).toBe(100);
        numbers.push(...body.numbers);
      }
      expect(numbers).toEqual(Array.from({ length: 100 }, (_, at) => 3 * at + 1));
    });

    it.each([
      ['length > 3', /no column length.*at character 1\)/],
      ['hull = "steel" and (note', /at character \d+\)/],
      ['[length [m]]] > "long"', /cannot be compared.*at character \d+\)/],
      ['[length [m]]] + 1', /condition is needed/],
    ])('are refused for %s, and the answer says where it is wrong', async (where, detail) => {
      const { status, body } = await get(id, 'rows', { where });
      expect([status, body.code]).toEqual([400, 'request-invalid']);
      expect(body.errors).toEqual([{ pointer: '#/where', detail: expect.stringMatching(detail) }]);
    });

    it('are refused for numbers past the last row', async () => {
      const { status, body } = await get(id, 'rows', { numbers: '1,301' });
      expect([status, body.code, body.errors[0].pointer]).toEqual([400, 'request-invalid', '#/numbers']);
    });
  });

  describe('how columns go together', () => {
    it('is Pearson’s correlation, as R has it, with neighbours that cluster together', async () => {
      const { id } = await bringIn(mtcars, 'Motor cars');
      const { body } = await get(id, 'correlations');
      const at = (a: string, b: string): number => body.correlations[body.columns.indexOf(a)][body.columns.indexOf(b)];
      // R 4.2.2: cor(mtcars).
      expect(at('mpg', 'wt')).toBeCloseTo(-0.867659, 6);
      expect(at('cyl', 'disp')).toBeCloseTo(0.902033, 6);
      expect(at('drat', 'qsec')).toBeCloseTo(0.091205, 6);
      expect(at('vs', 'gear')).toBeCloseTo(0.20602335, 8);
      expect(at('mpg', 'mpg')).toBe(1);
      expect(body.counts.flat()).toEqual(new Array(121).fill(32));
      // R 4.2.2: hclust(as.dist(1 - abs(cor(mtcars))), "average")$merge, as sets of columns that join.
      const joined = [
        ['cyl', 'disp'],
        ['mpg', 'wt'],
        ['mpg', 'wt', 'cyl', 'disp'],
        ['am', 'gear'],
        ['hp', 'cyl', 'disp', 'mpg', 'wt'],
        ['qsec', 'vs'],
        ['drat', 'am', 'gear'],
        ['carb', 'qsec', 'vs'],
        ['drat', 'am', 'gear', 'hp', 'cyl', 'disp', 'mpg', 'wt'],
      ];
      for (const set of joined) {
        const places = set.map((name) => body.columns.indexOf(name) as number);
        expect(Math.max(...places) - Math.min(...places)).toBe(set.length - 1);
      }
    });

    it('leaves out words, counts rows where both are present, and has no figure where one never varies', async () => {
      const text = ['a,b,c,word,day', '1,2,5,x,2020-01-01', '2,,5,y,2020-01-02', '3,1,5,x,2020-01-03', ',7,5,y,'];
      const { id } = await bringIn(text.join('\n'), 'Small');
      const { body } = await get(id, 'correlations');
      expect([...body.columns].sort()).toEqual(['a', 'b', 'c', 'day']);
      const [a, b, c, day] = ['a', 'b', 'c', 'day'].map((name) => body.columns.indexOf(name));
      expect(body.counts[a][b]).toBe(2);
      expect(body.correlations[a][b]).toBeCloseTo(-1, 12);
      expect(body.correlations[a][day]).toBeCloseTo(1, 12);
      expect(body.correlations[a][c]).toBeNull();
      expect(body.leftOut).toEqual([]);
    });

    it('has nothing to tell of a table of words', async () => {
      const { id } = await bringIn('word\nx\ny\n', 'Words');
      expect((await get(id, 'correlations')).body).toEqual({ columns: [], correlations: [], counts: [], leftOut: [] });
    });

    it('shows two columns against each other, with row numbers', async () => {
      const { id } = await bringIn('a,day,word\n1,2020-01-02,x\n,2020-01-03,y\n4,1970-01-02,x\n', 'Scatter');
      expect((await get(id, 'scatter', { x: 'a', y: 'day' })).body).toEqual({
        ...{ x: 'a', y: 'day', total: 2 },
        points: [
          { x: 1, y: 18_263, row: 1 },
          { x: 4, y: 1, row: 3 },
        ],
      });
      const refused = await get(id, 'scatter', { x: 'a', y: 'word' });
      expect([refused.status, refused.body.errors[0].pointer]).toEqual([400, '#/y']);
    });
  });

  describe('two revisions side by side', () => {
    const boats = (rows: readonly string[]) => `boat,length (m),hull\n${rows.join('\n')}\n`;
    const before = ['Tern,8,oak', 'Gull,9,steel', 'Skua,10,oak', 'Auk,,oak'];

    it('tell by a key what was added, removed and changed, and what became of each column', async () => {
      const { setId, id } = await bringIn(boats(before), 'Compared');
      const newer = await revise(setId, boats(['Auk,7,oak', 'Tern,8,larch', 'Skua,10,oak', 'Knot,6,oak']));
      const { status, body } = await get(newer, 'comparison', { with: id });
      expect(status).toBe(200);
      expect(body).toMatchObject({
        ...{ key: 'boat', keys: ['boat'], added: [4], removed: [2] },
        rows: { added: 1, removed: 1, changed: 2, unchanged: 1 },
        from: { id, number: 1 },
        to: { id: newer, number: 2 },
        changes: [
          { fromRow: 4, toRow: 1, cells: [{ column: 'length (m)', from: null, to: 7 }] },
          { fromRow: 1, toRow: 2, cells: [{ column: 'hull', from: 'oak', to: 'larch' }] },
        ],
      });
      expect(body.columns.map((column: { name: string; state: string }) => [column.name, column.state])).toEqual([
        ['boat', 'same'],
        ['length (m)', 'changed'],
        ['hull', 'changed'],
      ]);
      expect(body.columns[1]).toMatchObject({ from: { missingCount: 1, maximum: 10 }, to: { missingCount: 0 } });
      expect(body.columns[1].shape.edges).toHaveLength(21);
      expect(body.columns[1].shape.edges[0]).toBe(6);
      const byOrder = await get(newer, 'comparison', { with: id, key: '' });
      expect(byOrder.body).toMatchObject({ key: null, rows: { changed: 2, unchanged: 1, added: 1, removed: 1 } });
    });

    it('tell which columns a mending added and set aside, and that no row was lost', async () => {
      const { id } = await bringIn(boats(before), 'Mended');
      const steps = [
        { kind: 'set-aside', column: 'hull' },
        { kind: 'derive', name: 'double', formula: '[length (m)] * 2' },
      ];
      const asked = await analyst.post(`/api/record-revisions/${id}/mended-revisions`).send({ steps });
      expect(asked.status).toBe(202);
      const task = await endOfTask(analyst, asked.body.id);
      const { body } = await get(String(task.revisionId), 'comparison', { with: id });
      expect(body.rows).toEqual({ added: 0, removed: 0, changed: 0, unchanged: 4 });
      expect(body.columns).toEqual([
        expect.objectContaining({ name: 'boat', state: 'same' }),
        expect.objectContaining({ name: 'length (m)', state: 'same', changedCount: 0 }),
        expect.objectContaining({ name: 'double', state: 'added', changedCount: null, from: null, shape: null }),
        expect.objectContaining({ name: 'hull', state: 'removed', to: null }),
      ]);
    });

    it('are followed through a renamed column, both ways, so that its changed cells are told', async () => {
      const { id } = await bringIn(boats(before), 'Renamed');
      const steps = [
        { kind: 'map-levels', column: 'hull', levels: { steel: 'Steel' } },
        { kind: 'rename', column: 'hull', to: 'material' },
      ];
      const asked = await analyst.post(`/api/record-revisions/${id}/mended-revisions`).send({ steps });
      const task = await endOfTask(analyst, asked.body.id);
      const forth = (await get(String(task.revisionId), 'comparison', { with: id })).body;
      const back = (await get(id, 'comparison', { with: String(task.revisionId) })).body;
      const names = ({ columns }: { columns: { name: string; formerName: string | null }[] }) =>
        columns.filter(({ formerName }) => formerName !== null).map(({ name, formerName }) => [formerName, name]);
      expect([names(forth), names(back)]).toEqual([[['hull', 'material']], [['material', 'hull']]]);
      expect(forth.rows.changed).toBeGreaterThan(0);
      expect(forth.rows).toEqual({ added: 0, removed: 0, changed: back.rows.changed, unchanged: back.rows.unchanged });
      expect(forth.changes[0].cells).toEqual([{ column: 'material', from: 'steel', to: 'Steel' }]);
    });

    it('are refused when they are of different sets, or when the key does not name the rows', async () => {
      const [one, other] = [await bringIn(boats(before), 'One'), await bringIn(boats(before), 'Other')];
      const apart = await get(one.id, 'comparison', { with: other.id });
      expect([apart.status, apart.body.code, apart.body.errors[0].pointer]).toEqual([400, 'request-invalid', '#/with']);
      const newer = await revise(one.setId, boats(before.slice(1)));
      const badKey = await get(newer, 'comparison', { with: one.id, key: 'hull' });
      expect([badKey.status, badKey.body.errors[0].pointer]).toEqual([400, '#/key']);
      expect(badKey.body.errors[0].detail).toContain('boat can');
      expect((await get(newer, 'comparison', { with: newId() })).status).toBe(404);
    });
  });

  it('is refused once the rows have been erased', async () => {
    const { id } = await bringIn('a,b\n1,2\n', 'Erased');
    expect((await get(id, 'rows', { where: 'a = 1' })).status).toBe(200);
    await service.services
      .knex('recordRevisions')
      .where({ id })
      .update({ erasedAt: service.clock.now().toISOString() });
    const calls = [
      get(id, 'rows'),
      get(id, 'rows', { where: 'a = 1' }),
      get(id, 'correlations'),
      get(id, 'scatter', { x: 'a', y: 'b' }),
      get(id, 'comparison', { with: id }),
      get(id, 'findings'),
    ];
    for (const call of calls) {
      const { status, body } = await call;
      expect([status, body.code]).toEqual([410, 'records-erased']);
    }
  });
});
