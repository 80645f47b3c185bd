import { startTestService, type TestAgent, type TestService } from '../support/test-service';

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('the journal', () => {
  let service: TestService;
  let administrator: TestAgent;
  let start: number;
  beforeAll(async () => {
    service = await startTestService();
    administrator = await service.as('administrator');
    const actorId = administrator.person.id;
    start = service.clock.now().getTime() + 1000;
    for (let index = 0; index < 5; index += 1) {
      service.clock.advance(1000);
      const subject = { subjectKind: index % 2 === 0 ? 'edition' : 'partner', subjectId: `subject${index}` };
      await service.services.journal.write({
        actorId: index === 4 ? null : actorId,
        action: `tried-${index % 2}`,
        ...subject,
        summary: `Entry ${index}`,
      });
    }
  });
  afterAll(() => service.close());

  const summaries = async (query: string): Promise<string[]> => {
    const answer = await administrator.get(`/api/journal?${query}`).expect(200);
    return answer.body.items.map((entry: { summary: string }) => entry.summary);
  };
  const at = (index: number): string => new Date(start + index * 1000).toISOString();

  it('is listed with the newest first, each entry with the name of who did it', async () => {
    const { body } = await administrator.get('/api/journal?limit=2').expect(200);
    expect(body.items.map((entry: { summary: string }) => entry.summary)).toEqual(['Entry 4', 'Entry 3']);
    expect(body.items[0].actor).toBeNull();
    expect(body.items[1].actor).toEqual({ id: administrator.person.id, name: administrator.person.name });
    expect(body.total).toBe(6);
  });

  it('is cut into pages that neither overlap nor leave anything out', async () => {
    const whole = await summaries('limit=200');
    expect([...(await summaries('limit=4&offset=0')), ...(await summaries('limit=4&offset=4'))]).toEqual(whole);
  });

  it.each([
    ['action', () => 'action=tried-1', ['Entry 3', 'Entry 1']],
    ['subject', () => 'subjectKind=edition&subjectId=subject2', ['Entry 2']],
    ['actor', () => `actorId=${administrator.person.id}&subjectKind=edition`, ['Entry 2', 'Entry 0']],
    ['time, the end left out', () => `from=${at(1)}&to=${at(3)}`, ['Entry 2', 'Entry 1']],
  ])('is filtered by %s', async (_name, query, expected) => {
    expect(await summaries(query())).toEqual(expected);
    const { body } = await administrator.get(`/api/journal?limit=1&${query()}`).expect(200);
    expect(body.total).toBe(expected.length);
  });

  it('takes a time with an offset for the same moment', async () => {
    const local = new Date(start + 3_600_000 + 3000).toISOString().replace('Z', '%2B01:00');
    expect(await summaries(`from=${local}`)).toEqual(['Entry 4', 'Entry 3']);
  });

  it('is for administrators', async () => {
    for (const role of ['analyst', 'reviewer', 'viewer'] as const)
      await (await service.as(role)).get('/api/journal').expect(403);
  });
});
