import supertest from 'supertest';
import type { Operation } from '../../service/src/http/contract';
import { permissions, type DeskOperation } from '../../service/src/people/permissions';
import type { Role } from '../../service/src/people/person';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';
import { addPartner } from '../support/published-estimator';

const roles: readonly Role[] = ['administrator', 'analyst', 'reviewer', 'viewer', 'partner-developer'];

/** Well formed and naming nothing, so that a permitted call fails only for what it names. */
const placeholders: Readonly<Record<string, string>> = {
  slug: 'no-such-estimator',
  token: 'x'.repeat(43),
  id: 'nosuchrow0000000',
  siteId: 'nosuchsite000000',
};
const addressOf = ({ path }: Operation): string =>
  `/api${path.replace(/:(\w+)/g, (_, name: string) => placeholders[name] ?? 'nosuchrow0000000')}`;

interface Sender {
  get(path: string): supertest.Test;
  post(path: string): supertest.Test;
  patch(path: string): supertest.Test;
  put(path: string): supertest.Test;
  delete(path: string): supertest.Test;
}

function send(sender: Sender, operation: Operation): supertest.Test {
  const address = addressOf(operation);
  if (operation.method === 'get') return sender.get(address);
  if (operation.method === 'delete') return sender.delete(address);
  if (operation.method === 'put') return sender.put(address).send({});
  return operation.method === 'patch' ? sender.patch(address).send({}) : sender.post(address).send({});
}

const mayCall = (id: string, role: Role): boolean => {
  const access = permissions[id as DeskOperation];
  return access === 'public' || access === 'signed-in' || access.includes(role);
};

describe('the table of rights', () => {
  let service: TestService;
  const agents = new Map<Role, TestAgent>();
  /** Reading the session gives a new token and signing out ends it: these two have a test of their own. */
  const operations = (): Operation[] =>
    service.services.deskContract.operations.filter(({ id }) => id !== 'readSession' && id !== 'signOut');

  beforeAll(async () => {
    service = await startTestService();
    const administrator = await service.as('administrator');
    agents.set('administrator', administrator);
    const partnerId = await addPartner(service, administrator.person, 'https://www.partner.example');
    for (const role of roles.slice(1)) {
      agents.set(
        role,
        await service.signIn(await service.addPerson([role], role === 'partner-developer' ? { partnerId } : {})),
      );
    }
  });
  afterAll(() => service.close());

  it('has a line for every operation of the contract, and none more', () => {
    expect(Object.keys(permissions).sort()).toEqual(
      service.services.deskContract.operations.map(({ id }) => id).sort(),
    );
  });

  it('lets nobody in who has not signed in, but to what is public', async () => {
    const refused: string[] = [];
    for (const operation of operations()) {
      const answer = await send(supertest(service.app), operation);
      if (answer.status === 401 && answer.body.code === 'sign-in-required') refused.push(operation.id);
    }
    expect(refused.sort()).toEqual(
      operations()
        .map(({ id }) => id)
        .filter((id) => permissions[id as DeskOperation] !== 'public')
        .sort(),
    );
  });

  it.each(roles)('is what decides for the role %s', async (role) => {
    const refused: string[] = [];
    for (const operation of operations()) {
      const answer = await send(agents.get(role) as TestAgent, operation);
      expect([operation.id, answer.status]).not.toEqual([operation.id, 500]);
      expect([operation.id, answer.body.code]).not.toEqual([operation.id, 'sign-in-required']);
      expect([operation.id, answer.body.code]).not.toEqual([operation.id, 'request-forged']);
      if (answer.body.code === 'not-permitted') refused.push(operation.id);
    }
    expect(refused.sort()).toEqual(
      operations()
        .map(({ id }) => id)
        .filter((id) => !mayCall(id, role))
        .sort(),
    );
  });

  it.each(roles)('lets the role %s read their session and sign out', async (role) => {
    const agent = agents.get(role) as TestAgent;
    const session = await agent.get('/api/session').expect(200);
    await agent.delete('/api/session').set('X-XSRF-TOKEN', session.body.csrfToken).expect(204);
    expect((await agent.get('/api/session')).body.code).toBe('sign-in-required');
  });

  it('lets nobody read a session or sign out who has not signed in', async () => {
    expect((await supertest(service.app).get('/api/session')).body.code).toBe('sign-in-required');
    expect((await supertest(service.app).delete('/api/session')).body.code).toBe('sign-in-required');
  });
});
