import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import supertest from 'supertest';
import { startTestService, testPassword, type TestAgent, type TestService } from '../support/test-service';

const dayMs = 24 * 60 * 60 * 1000;
const goodPassword = 'copper kettle nine ferries';

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('people', () => {
  let service: TestService;
  let administrator: TestAgent;
  let counter = 0;
  beforeAll(async () => {
    service = await startTestService();
    administrator = await service.as('administrator');
  });
  afterAll(() => service.close());

  const invite = (body: Record<string, unknown> = {}) =>
    administrator
      .post('/api/people')
      .send({ name: 'Ada Ferris', email: `ada${++counter}@marlbay.example`, roles: ['analyst'], ...body });
  const tokenOf = (url: string): string => url.split('/').at(-1) as string;
  const accept = (token: string, password = goodPassword) =>
    supertest(service.app).post(`/api/invitations/${token}`).send({ password });
  const signIn = (email: string, password: string) =>
    supertest(service.app).post('/api/session').send({ email, password });
  const addPartner = async (): Promise<string> => {
    const id = `partner${String(++counter).padStart(9, '0')}`;
    const row = {
      id,
      name: id,
      nameKey: id,
      contactEmail: 'them@partner.example',
      createdAt: service.clock.now().toISOString(),
      createdBy: administrator.person.id,
    };
    await service.services.knex('partners').insert(row);
    return id;
  };

  describe('an invitation', () => {
    it('lets the person set a password and then sign in', async () => {
      const invited = await invite({ email: 'Ines@MarlBay.example' });
      expect(invited.status).toBe(201);
      expect(invited.body.person).toMatchObject({ name: 'Ada Ferris', roles: ['analyst'], state: 'invited' });
      expect((await signIn('ines@marlbay.example', goodPassword)).status).toBe(401);
      const token = tokenOf(invited.body.invitationUrl);
      const shown = await supertest(service.app).get(`/api/invitations/${token}`).expect(200);
      expect(shown.body).toEqual({
        name: 'Ada Ferris',
        email: 'Ines@MarlBay.example',
        expiresAt: invited.body.expiresAt,
      });
      await accept(token).expect(204);
      const session = await signIn('ines@marlbay.example', goodPassword);
      expect(session.body.person.roles).toEqual(['analyst']);
    });

    it('goes out by mail with the same address that the administrator is shown', async () => {
      const invited = await invite();
      expect(invited.body.mailSent).toBe(true);
      const folder = join(service.services.config.dataFolder, 'mail');
      const newest = readdirSync(folder).sort().at(-1) as string;
      const text = readFileSync(join(folder, newest), 'utf8').replaceAll('=\r\n', '');
      expect(text).toContain(`To: Ada Ferris <ada${counter}@marlbay.example>`);
      expect(text).toContain(invited.body.invitationUrl);
    });

    it('leaves no token in the database', async () => {
      const invited = await invite();
      const rows: unknown[] = await service.services.knex('invitations');
      expect(JSON.stringify(rows)).not.toContain(tokenOf(invited.body.invitationUrl));
    });

    it('works once, even when two answers come at the same time', async () => {
      const token = tokenOf((await invite()).body.invitationUrl);
      const answers = await Promise.all([accept(token), accept(token, 'nine other ferries sail')]);
      expect(answers.map((answer) => answer.status).sort()).toEqual([204, 410]);
      const late = await supertest(service.app).get(`/api/invitations/${token}`);
      expect([late.status, late.body.code]).toEqual([410, 'invitation-spent']);
    });

    it('runs out after seven days', async () => {
      const token = tokenOf((await invite()).body.invitationUrl);
      service.clock.advance(7 * dayMs - 1);
      await supertest(service.app).get(`/api/invitations/${token}`).expect(200);
      service.clock.advance(1);
      const late = await accept(token);
      expect([late.status, late.body.code]).toEqual([410, 'invitation-spent']);
    });

    it('is replaced when the same person is invited again', async () => {
      const first = await invite({ email: 'again@marlbay.example' });
      const second = await invite({ email: 'AGAIN@marlbay.example', name: 'Ada Ferris-Holm', roles: ['reviewer'] });
      expect(second.body.person).toMatchObject({
        id: first.body.person.id,
        name: 'Ada Ferris-Holm',
        roles: ['reviewer'],
      });
      expect((await accept(tokenOf(first.body.invitationUrl))).status).toBe(410);
      await accept(tokenOf(second.body.invitationUrl)).expect(204);
    });

    it('is refused for someone who is active', async () => {
      const person = await service.addPerson(['viewer']);
      const refused = await invite({ email: person.email });
      expect([refused.status, refused.body.code]).toEqual([409, 'email-taken']);
    });

    it('refuses a password that is easy to guess, and stays open', async () => {
      const token = tokenOf((await invite()).body.invitationUrl);
      const weak = await accept(token, 'qwertyuiopasdfghjkl');
      expect([weak.status, weak.body.code]).toEqual([422, 'password-too-weak']);
      expect(weak.body.errors[0].pointer).toBe('#/password');
      await accept(token).expect(204);
    });

    it('with an unknown token leads nowhere', async () => {
      expect((await accept('a'.repeat(43))).status).toBe(404);
    });

    it('for a partner developer needs a partner that exists and no desk role', async () => {
      const partnerId = await addPartner();
      const roles = ['partner-developer'];
      expect((await invite({ roles })).body.errors[0].pointer).toBe('#/partnerId');
      expect((await invite({ roles, partnerId: 'nosuchpartner0000' })).body.errors[0].pointer).toBe('#/partnerId');
      expect((await invite({ roles: [...roles, 'viewer'], partnerId })).body.errors[0].pointer).toBe('#/roles');
      expect((await invite({ roles: ['viewer'], partnerId })).body.errors[0].pointer).toBe('#/roles');
      expect((await invite({ roles, partnerId })).body.person.partnerId).toBe(partnerId);
    });
  });

  describe('a change', () => {
    it('of roles counts in an open session', async () => {
      const viewer = await service.as('viewer');
      await viewer.get('/api/people').expect(403);
      const changed = await administrator
        .patch(`/api/people/${viewer.person.id}`)
        .send({ roles: ['administrator', 'viewer'] });
      expect(changed.body.roles).toEqual(['administrator', 'viewer']);
      await viewer.get('/api/people').expect(200);
      await administrator
        .patch(`/api/people/${viewer.person.id}`)
        .send({ roles: ['viewer'] })
        .expect(200);
    });

    it('that closes someone ends their open sessions; opening lets them in again', async () => {
      const viewer = await service.as('viewer');
      await administrator.patch(`/api/people/${viewer.person.id}`).send({ closed: true }).expect(200);
      await viewer.get('/api/session').expect(401);
      expect((await signIn(viewer.person.email, testPassword)).status).toBe(401);
      const opened = await administrator.patch(`/api/people/${viewer.person.id}`).send({ closed: false });
      expect(opened.body.state).toBe('active');
      expect((await signIn(viewer.person.email, testPassword)).status).toBe(200);
    });

    it('that closes someone invited ends the invitation', async () => {
      const invited = await invite();
      await administrator.patch(`/api/people/${invited.body.person.id}`).send({ closed: true }).expect(200);
      expect((await accept(tokenOf(invited.body.invitationUrl))).status).toBe(410);
      const opened = await administrator.patch(`/api/people/${invited.body.person.id}`).send({ closed: false });
      expect(opened.body.state).toBe('invited');
    });

    it('lets someone closed be invited anew, with no password left from before', async () => {
      const viewer = await service.addPerson(['viewer']);
      await administrator.patch(`/api/people/${viewer.id}`).send({ closed: true }).expect(200);
      const invited = await invite({ email: viewer.email });
      expect((await signIn(viewer.email, testPassword)).status).toBe(401);
      await accept(tokenOf(invited.body.invitationUrl)).expect(204);
      expect((await signIn(viewer.email, goodPassword)).status).toBe(200);
    });

    it.each([{ closed: true }, { roles: ['viewer'] }])(
      'that would leave no administrator is refused and changes nothing: %j',
      async (change) => {
        const refused = await administrator.patch(`/api/people/${administrator.person.id}`).send(change);
        expect([refused.status, refused.body.code]).toEqual([409, 'last-administrator']);
        const list = await administrator.get('/api/people?limit=200').expect(200);
        const entry = list.body.items.find((person: { id: string }) => person.id === administrator.person.id);
        expect(entry).toMatchObject({ state: 'active', roles: ['administrator'] });
      },
    );

    it('cannot make desk people partner developers, nor the reverse', async () => {
      const viewer = await service.addPerson(['viewer']);
      const developer = await service.addPerson(['partner-developer'], { partnerId: await addPartner() });
      expect(
        (await administrator.patch(`/api/people/${viewer.id}`).send({ roles: ['partner-developer'] })).status,
      ).toBe(400);
      expect((await administrator.patch(`/api/people/${developer.id}`).send({ roles: ['analyst'] })).status).toBe(400);
    });

    it('is written in the journal with its author', async () => {
      const viewer = await service.addPerson(['viewer'], { name: 'Ole Brandt' });
      await administrator
        .patch(`/api/people/${viewer.id}`)
        .send({ name: 'Ole Brandt-Ness', roles: ['analyst'] })
        .expect(200);
      const [entry] = await service.services.knex('journal').where({ subjectId: viewer.id }).orderBy('id', 'desc');
      expect(entry).toMatchObject({ actorId: administrator.person.id, action: 'person-changed' });
      expect(entry.summary).toBe('Ole Brandt-Ness: renamed from Ole Brandt; roles viewer → analyst');
    });
  });

  it('are listed in pages, by name', async () => {
    const all = await administrator.get('/api/people?limit=200').expect(200);
    const names = all.body.items.map((person: { name: string }) => person.name);
    expect(names).toEqual([...names].sort());
    expect(all.body.total).toBe(names.length);
    const second = await administrator.get('/api/people?limit=1&offset=1').expect(200);
    expect(second.body.items).toEqual([all.body.items[1]]);
  });

  it('are an administrator’s business', async () => {
    for (const role of ['analyst', 'reviewer', 'viewer'] as const) {
      const agent = await service.as(role);
      expect(
        (await agent.post('/api/people').send({ name: 'X', email: 'x@y.example', roles: ['administrator'] })).status,
      ).toBe(403);
    }
  });
});
