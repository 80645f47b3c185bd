import supertest from 'supertest';
import { startTestService, testPassword, type TestService } from '../support/test-service';

describe('signing in', () => {
  let service: TestService;
  beforeAll(async () => void (service = await startTestService()));
  afterAll(() => service.close());

  it('gives a strict, http-only cookie and tells who is signed in', async () => {
    const person = await service.addPerson(['analyst', 'reviewer']);
    const answer = await supertest(service.app)
      .post('/api/session')
      .send({ email: person.email.toUpperCase(), password: testPassword });
    expect(answer.status).toBe(200);
    expect(answer.body.person).toMatchObject({ id: person.id, roles: ['analyst', 'reviewer'], partnerId: null });
    const cookie = (answer.headers['set-cookie'] as unknown as string[]).find((line) => line.startsWith('tarebeam='));
    expect(cookie).toMatch(/HttpOnly/);
    expect(cookie).toMatch(/SameSite=Strict/);
  });

  it('answers an unknown address and a wrong password alike', async () => {
    const person = await service.addPerson(['viewer']);
    const wrong = await supertest(service.app)
      .post('/api/session')
      .send({ email: person.email, password: 'not the password' });
    const unknown = await supertest(service.app)
      .post('/api/session')
      .send({ email: 'nobody@desk.example', password: 'not the password' });
    expect(wrong.status).toBe(401);
    expect(wrong.type).toBe('application/problem+json');
    expect(wrong.body.code).toBe('sign-in-refused');
    expect({ ...unknown.body, requestId: '' }).toEqual({ ...wrong.body, requestId: '' });
  });

  it('makes an account wait, longer each time, after repeated failures', async () => {
    const person = await service.addPerson(['viewer']);
    const attempt = (password: string) =>
      supertest(service.app).post('/api/session').send({ email: person.email, password });
    for (let failure = 0; failure < 3; failure++) expect((await attempt('wrong')).status).toBe(401);
    const first = await attempt(testPassword);
    expect(first.status).toBe(429);
    expect(first.headers['retry-after']).toBe('1');
    service.clock.advance(1000);
    expect((await attempt('wrong')).status).toBe(401);
    expect((await attempt(testPassword)).headers['retry-after']).toBe('2');
    service.clock.advance(2000);
    expect((await attempt(testPassword)).status).toBe(200);
  });

  it('refuses an unsafe call without the guard’s header', async () => {
    const agent = supertest.agent(service.app);
    const person = await service.addPerson(['administrator']);
    await agent.post('/api/session').send({ email: person.email, password: testPassword }).expect(200);
    const refused = await agent.delete('/api/session');
    expect(refused.status).toBe(403);
    expect(refused.body.code).toBe('request-forged');
    await agent.get('/api/session').expect(200);
  });

  it('refuses to sign in from another site’s page', async () => {
    const person = await service.addPerson(['viewer']);
    const refused = await supertest(service.app)
      .post('/api/session')
      .set('Origin', 'https://elsewhere.example')
      .send({ email: person.email, password: testPassword });
    expect(refused.body.code).toBe('request-forged');
  });

  it('ends the session at sign-out', async () => {
    const agent = await service.as('viewer');
    await agent.delete('/api/session').expect(204);
    const after = await agent.get('/api/session');
    expect(after.status).toBe(401);
    expect(after.body.code).toBe('sign-in-required');
  });

  it('points at what is wrong with a body', async () => {
    const answer = await supertest(service.app).post('/api/session').send({ email: 'a@b' });
    expect(answer.status).toBe(400);
    expect(answer.body.errors).toEqual([{ pointer: '#/password', detail: expect.stringContaining('password') }]);
  });

  it('answers a method that the address does not take with 405 and what it takes', async () => {
    const answer = await supertest(service.app).put('/api/session');
    expect(answer.status).toBe(405);
    expect(answer.headers['allow']).toBe('GET, POST, DELETE');
  });
});
