import { startTestService, type TestAgent, type TestService } from '../support/test-service';

// A sign-in hashes for half a second on purpose, and longer where other tests share the processor.
jest.setTimeout(30_000);

describe('partners', () => {
  let service: TestService;
  let administrator: TestAgent;
  let counter = 0;
  beforeAll(async () => {
    service = await startTestService();
    administrator = await service.as('administrator');
  });
  afterAll(() => service.close());

  const enter = async (name = `Partner ${++counter}`): Promise<{ id: string; name: string }> => {
    const entered = await administrator.post('/api/partners').send({ name, contactEmail: 'yard@partner.example' });
    expect(entered.status).toBe(201);
    return entered.body;
  };
  const addSite = (id: string, origin: string, agent = administrator) =>
    agent.post(`/api/partners/${id}/sites`).send({ origin });
  const issue = (id: string, body: Record<string, unknown> = {}) =>
    administrator.post(`/api/partners/${id}/keys`).send({ kind: 'partner', label: 'Server', ...body });

  it('are entered with nothing yet', async () => {
    const partner = await enter('Northquay Moorings');
    expect(partner).toMatchObject({
      name: 'Northquay Moorings',
      contactEmail: 'yard@partner.example',
      sites: [],
      keys: [],
      estimateCount: 0,
    });
    expect((await administrator.get(`/api/partners/${partner.id}`)).body).toEqual(partner);
  });

  it('have names that differ in more than case and spaces', async () => {
    await enter('Pell & Tarn');
    const again = await administrator
      .post('/api/partners')
      .send({ name: ' pell  & TARN ', contactEmail: 'a@b.example' });
    expect([again.status, again.body.code]).toEqual([409, 'name-taken']);
    const other = await enter();
    const renamed = await administrator.patch(`/api/partners/${other.id}`).send({ name: 'PELL & TARN' });
    expect(renamed.body.code).toBe('name-taken');
    expect((await administrator.get(`/api/partners/${other.id}`)).body.name).toBe(other.name);
  });

  it('may take their own name in other letters', async () => {
    const partner = await enter('outer shoal');
    const renamed = await administrator
      .patch(`/api/partners/${partner.id}`)
      .send({ name: 'Outer Shoal', contactEmail: 'new@shoal.example' });
    expect(renamed.body).toMatchObject({ name: 'Outer Shoal', contactEmail: 'new@shoal.example' });
  });

  it('list sites as browsers send them, once each', async () => {
    const { id } = await enter();
    const added = await addSite(id, 'HTTPS://Www.Partner.Example:443/');
    expect([added.status, added.body.origin]).toEqual([201, 'https://www.partner.example']);
    const again = await addSite(id, 'https://www.partner.example');
    expect([again.status, again.body.code]).toEqual([409, 'site-taken']);
    const wrong = await addSite(id, 'https://www.partner.example/estimates');
    expect([wrong.status, wrong.body.code]).toEqual([422, 'site-invalid']);
    expect(wrong.body.detail).toContain('Write https://www.partner.example.');
    expect((await addSite((await enter()).id, 'https://www.partner.example')).status).toBe(201);
  });

  it('lose a site only through their own address', async () => {
    const { id } = await enter();
    const site = (await addSite(id, 'https://one.example')).body;
    const other = await enter();
    expect((await administrator.delete(`/api/partners/${other.id}/sites/${site.id}`)).status).toBe(404);
    await administrator.delete(`/api/partners/${id}/sites/${site.id}`).expect(204);
    expect((await administrator.get(`/api/partners/${id}`)).body.sites).toEqual([]);
    expect((await administrator.delete(`/api/partners/${id}/sites/${site.id}`)).status).toBe(404);
  });

  it('are listed by name with counts of their own sites, live keys and estimates', async () => {
    const { id, name } = await enter('Aa counted');
    const rival = await enter('Aa rival');
    await addSite(id, 'https://two.example');
    await addSite(id, 'https://three.example');
    await addSite(rival.id, 'https://two.example');
    const used = (await issue(id)).body;
    await issue(rival.id);
    await issue(id, { expiresAt: new Date(service.clock.now().getTime() + 60_000).toISOString() });
    await administrator.post(`/api/keys/${(await issue(id)).body.id}/revoke`).expect(200);
    service.clock.advance(60_000);
    const usedAt = service.clock.now().toISOString();
    await service.services.knex('keys').where({ id: used.id }).update({ lastUsedAt: usedAt });
    await service.services.knex('keyMonths').insert([
      { keyId: used.id, month: '2026-10', estimateCount: 40 },
      { keyId: used.id, month: '2026-11', estimateCount: 2 },
    ]);
    const { body } = await administrator.get('/api/partners?limit=2').expect(200);
    expect(body.items[0]).toMatchObject({ id, name, siteCount: 2, keyCount: 1, estimateCount: 42, lastUsedAt: usedAt });
    expect(body.items[1]).toMatchObject({
      id: rival.id,
      siteCount: 1,
      keyCount: 1,
      estimateCount: 0,
      lastUsedAt: null,
    });
    expect(body.total).toBeGreaterThan(2);
    const one = await administrator.get(`/api/partners/${id}`).expect(200);
    expect(one.body.estimateCount).toBe(42);
    expect(one.body.keys).toHaveLength(3);
  });

  it('show a developer their own entry and of others not even that they exist', async () => {
    const own = await enter();
    const other = await enter();
    const developer = await service.signIn(await service.addPerson(['partner-developer'], { partnerId: own.id }));
    await developer.get(`/api/partners/${own.id}`).expect(200);
    expect((await addSite(own.id, 'https://own.example', developer)).status).toBe(201);
    const unknown = await developer.get('/api/partners/nosuchpartner0000');
    const foreign = await developer.get(`/api/partners/${other.id}`);
    expect(foreign.status).toBe(404);
    expect({ ...foreign.body, requestId: '' }).toEqual({ ...unknown.body, requestId: '' });
    const site = (await addSite(other.id, 'https://other.example')).body;
    expect((await addSite(other.id, 'https://own.example', developer)).status).toBe(404);
    expect((await developer.delete(`/api/partners/${other.id}/sites/${site.id}`)).status).toBe(404);
    expect((await developer.get('/api/partners')).status).toBe(403);
    expect((await developer.patch(`/api/partners/${own.id}`).send({ name: 'Mine' })).status).toBe(403);
  });

  it('leave an entry in the journal for every change', async () => {
    const { id, name } = await enter();
    const site = (await addSite(id, 'https://www.noted.example')).body;
    await administrator.delete(`/api/partners/${id}/sites/${site.id}`).expect(204);
    await administrator.patch(`/api/partners/${id}`).send({ contactEmail: 'b@partner.example' }).expect(200);
    const { body } = await administrator.get(`/api/journal?subjectKind=partner&subjectId=${id}`).expect(200);
    expect(body.items.map((entry: { summary: string }) => entry.summary)).toEqual([
      `${name}: contact b@partner.example`,
      `https://www.noted.example taken off the list of ${name}`,
      `https://www.noted.example listed for ${name}`,
      `${name} entered as a partner`,
    ]);
  });
});
