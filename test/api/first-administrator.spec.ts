import { pino } from 'pino';
import supertest from 'supertest';
import { enterFirstAdministrator } from '../../service/src/people/first-administrator';
import { startTestService, type TestService } from '../support/test-service';

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('the first administrator', () => {
  let service: TestService;
  let logged: string[];
  const administrator = { email: 'first@desk.example', password: 'copper kettle nine ferries' };
  beforeEach(async () => {
    service = await startTestService();
    logged = [];
  });
  afterEach(() => service.close());

  const enter = (given: typeof administrator | null) => {
    const log = pino({ level: 'info' }, { write: (line: string) => void logged.push(line) });
    return enterFirstAdministrator({ ...service.services, administrator: given, log });
  };
  const names = (): Promise<string[]> => service.services.knex('people').pluck('email');

  it('comes from the environment, can sign in and holds every desk role', async () => {
    await enter(administrator);
    const session = await supertest(service.app).post('/api/session').send(administrator);
    expect(session.body.person).toMatchObject({
      email: administrator.email,
      roles: ['administrator', 'analyst', 'reviewer', 'viewer'],
    });
  });

  it('is entered once, also when two processes start at the same time', async () => {
    await Promise.all([enter(administrator), enter({ ...administrator, email: 'second@desk.example' })]);
    await enter({ ...administrator, email: 'third@desk.example' });
    expect(await names()).toHaveLength(1);
  });

  it('is never made up: without the variables one line tells how', async () => {
    await enter(null);
    expect(await names()).toEqual([]);
    expect(logged).toHaveLength(1);
    expect(logged[0]).toContain('ADMIN_EMAIL and ADMIN_PASSWORD');
  });

  it('is refused a password that is easy to guess', async () => {
    await expect(enter({ ...administrator, password: 'aaaaaaaaaaaaaaaaaaaa' })).rejects.toThrow(
      /^ADMIN_PASSWORD is "easy to guess"/,
    );
    expect(await names()).toEqual([]);
  });

  it('leaves the password out of the log', async () => {
    await enter(administrator);
    expect(logged.join()).not.toContain(administrator.password);
  });
});
