import supertest from 'supertest';
import { mostEmbedCallsPerAddressMinute, mostRefusalsPerMinute } from '../../service/src/keys/key-limits';
import { newKeyText } from '../../service/src/keys/key-text';
import { addPartner, boat, openDesk, putInForce, type Desk } from '../support/published-estimator';
import { startTestService, type TestService } from '../support/test-service';

const site = 'https://www.partner.example';

interface Issued {
  readonly id: string;
  readonly key: string;
}

describe('the partner API', () => {
  let service: TestService;
  let desk: Desk;
  let partnerId: string;
  beforeAll(async () => {
    service = await startTestService();
    desk = await openDesk(service);
    await desk.analyst
      .post('/api/estimators')
      .send({ slug: 'crane-time', name: 'Crane time', targetName: 'Time', unit: 'min' })
      .expect(201);
    partnerId = await addPartner(service, desk.administrator.person, site);
    await putInForce(desk, desk.fitId);
  });
  afterAll(() => service.close());

  async function issue(terms: object = {}, of = partnerId): Promise<Issued> {
    const answer = await desk.administrator
      .post(`/api/partners/${of}/keys`)
      .send({ kind: 'partner', label: 'Server', ...terms })
      .expect(201);
    return answer.body as Issued;
  }

  const list = (key: string): supertest.Test => supertest(service.app).get('/v1/estimators').set('X-Api-Key', key);
  const ask = (key: string): supertest.Test =>
    supertest(service.app).post('/v1/estimators/refit-labour/estimates').set('X-Api-Key', key).send({ inputs: boat });

  describe('keys', () => {
    it('are shown once and kept as a hash only', async () => {
      const { id, key } = await issue();
      const [row] = await service.services.knex('keys').where({ id });
      expect(JSON.stringify(row)).not.toContain(key);
      expect(row.secretHash).toMatch(/^[0-9a-f]{64}$/);
      expect(row.lastFour).toBe(key.slice(-4));
      expect(JSON.stringify(await service.services.keys.listOfPartner(partnerId))).not.toContain(key);
      expect(JSON.stringify(await service.services.knex('journal'))).not.toContain(key);
    });

    it.each([
      ['key-missing', async (): Promise<string> => ''],
      ['key-malformed', async (): Promise<string> => 'a guess of mine'],
      ['key-malformed', async (): Promise<string> => `${(await issue()).key.slice(0, -1)}!`],
      ['key-refused', async (): Promise<string> => newKeyText('partner').text],
      [
        'key-refused',
        async () => {
          const { id, key } = await issue();
          await service.services
            .knex('keys')
            .where({ id })
            .update({ secretHash: '0'.repeat(64) });
          return key;
        },
      ],
      [
        'key-revoked',
        async () => {
          const { id, key } = await issue();
          await desk.administrator.post(`/api/keys/${id}/revoke`).expect(200);
          return key;
        },
      ],
      [
        'key-expired',
        async () => {
          const { key } = await issue({ expiresAt: new Date(service.clock.now().getTime() + 1000).toISOString() });
          await list(key).expect(200);
          service.clock.advance(1000);
          return key;
        },
      ],
    ] as const)('that cannot be used answer 401 %s', async (code, makeKey) => {
      const key = await makeKey();
      const answer = await (key === '' ? supertest(service.app).get('/v1/estimators') : list(key));
      expect(answer.status).toBe(401);
      expect(answer.type).toBe('application/problem+json');
      expect(answer.body.code).toBe(code);
      expect(answer.headers['www-authenticate']).toBe('ApiKey header="X-Api-Key"');
      if (key !== '') expect(answer.text).not.toContain(key);
    });

    it('do not work in the address', async () => {
      const { key } = await issue();
      const answer = await supertest(service.app).get(`/v1/estimators?X-Api-Key=${key}`);
      expect(answer.body.code).toBe('key-missing');
    });

    it('reach the estimators of their list only', async () => {
      const { key } = await issue({ estimators: ['crane-time'] });
      expect((await list(key)).body).toEqual({ items: [] });
      const refused = await ask(key);
      expect(refused.status).toBe(403);
      expect(refused.body.code).toBe('key-out-of-scope');
      expect((await supertest(service.app).get('/v1/estimators/crane-time').set('X-Api-Key', key)).body.code).toBe(
        'nothing-in-force',
      );
      expect((await supertest(service.app).get('/v1/estimators/no-such').set('X-Api-Key', key)).status).toBe(404);
    });

    it('are issued only over estimators that exist and into the future', async () => {
      const post = (terms: object) =>
        desk.administrator.post(`/api/partners/${partnerId}/keys`).send({ kind: 'partner', label: 'Server', ...terms });
      const unknown = await post({ estimators: ['refit-labour', 'no-such'] });
      expect(unknown.body).toMatchObject({ code: 'estimator-unknown', errors: [{ pointer: '#/estimators/1' }] });
      const past = await post({ expiresAt: service.clock.now().toISOString() });
      expect(past.body).toMatchObject({ code: 'request-invalid', errors: [{ pointer: '#/expiresAt' }] });
      expect(
        (
          await desk.administrator
            .post('/api/partners/nosuchpartner000/keys')
            .send({ kind: 'partner', label: 'Server' })
        ).status,
      ).toBe(404);
    });

    it('for pages need a site that is listed', async () => {
      const other = await addPartner(service, desk.administrator.person, 'https://gone.example');
      await service.services.knex('partnerSites').where({ partnerId: other }).delete();
      const refused = await desk.administrator
        .post(`/api/partners/${other}/keys`)
        .send({ kind: 'embed', label: 'Form' });
      expect(refused.body).toMatchObject({ code: 'request-invalid', errors: [{ pointer: '#/kind' }] });
    });

    it('are issued and revoked by a partner developer for their own partner only', async () => {
      const developer = await service.signIn(await service.addPerson(['partner-developer'], { partnerId }));
      const other = await addPartner(service, desk.administrator.person, 'https://foreign.example');
      const own = await developer.post(`/api/partners/${partnerId}/keys`).send({ kind: 'partner', label: 'Own' });
      expect(own.status).toBe(201);
      expect(own.body.details).toMatchObject({
        label: 'Own',
        state: 'live',
        estimators: 'all',
        usedThisMonth: 0,
        createdBy: { id: developer.person.id },
      });
      expect(
        (await developer.post(`/api/partners/${other}/keys`).send({ kind: 'partner', label: 'Foreign' })).status,
      ).toBe(404);
      const foreign = await issue({}, other);
      expect((await developer.post(`/api/keys/${foreign.id}/revoke`)).status).toBe(404);
      await list(foreign.key).expect(200);
      expect((await developer.post(`/api/keys/${own.body.id}/revoke`)).body.state).toBe('revoked');
    });

    it('get at most sixty calls a minute from a partner developer, and more from the desk', async () => {
      const developer = await service.signIn(await service.addPerson(['partner-developer'], { partnerId }));
      const generous = { kind: 'partner', label: 'Generous', perMinute: 61 };
      const refused = await developer.post(`/api/partners/${partnerId}/keys`).send(generous);
      expect(refused.status).toBe(400);
      expect(refused.body.errors[0].pointer).toBe('#/perMinute');
      await developer
        .post(`/api/partners/${partnerId}/keys`)
        .send({ ...generous, perMinute: 60 })
        .expect(201);
      await issue(generous);
    });

    it('tell how much they were used this month, and when last', async () => {
      const { id, key } = await issue();
      await ask(key).expect(200);
      service.clock.advance(59_000);
      await ask(key).expect(200);
      const read = async () => (await service.services.keys.listOfPartner(partnerId)).find((entry) => entry.id === id);
      const first = new Date(service.clock.now().getTime() - 59_000).toISOString();
      expect(await read()).toMatchObject({ usedThisMonth: 2, lastUsedAt: first });
      service.clock.advance(1000);
      await ask(key).expect(200);
      expect(await read()).toMatchObject({ usedThisMonth: 3, lastUsedAt: service.clock.now().toISOString() });
    });
  });

  describe('describes', () => {
    it('what the key may use, with inputs and cautions', async () => {
      const { key } = await issue();
      const listed = await list(key);
      expect(listed.body.items).toHaveLength(1);
      expect(listed.body.items[0]).toMatchObject({
        slug: 'refit-labour',
        edition: 1,
        unit: 'h',
        cautions: ['An estimate is not a quotation.'],
      });
      const one = await supertest(service.app).get('/v1/estimators/refit-labour').set('X-Api-Key', key);
      expect(one.body).toEqual(listed.body.items[0]);
      expect(Object.keys(one.body.inputs.properties)).toEqual(['length overall', 'beam', 'hull', 'ballast']);
    });

    it('in answers that nothing between may keep and that other origins may load', async () => {
      const { headers } = await list((await issue()).key);
      expect(headers['cache-control']).toBe('no-store');
      expect(headers['cross-origin-resource-policy']).toBe('cross-origin');
    });
  });

  describe('limits', () => {
    it('calls a minute for each key, with the fields of the draft', async () => {
      const { key } = await issue({ perMinute: 2 });
      const first = await list(key);
      expect(first.headers['ratelimit']).toMatch(/^"per-key-minute"; r=1; t=\d+$/);
      expect(first.headers['ratelimit-policy']).toMatch(/^"per-key-minute"; q=2; w=60; pk=:[A-Za-z0-9+/=]+:$/);
      expect(first.headers).not.toHaveProperty('x-ratelimit-limit');
      await list(key).expect(200);
      const refused = await list(key);
      expect(refused.status).toBe(429);
      expect(refused.body).toMatchObject({ code: 'rate-exceeded', retryAfter: Number(refused.headers['retry-after']) });
      expect(refused.body.retryAfter).toBeGreaterThan(0);
      await list((await issue()).key).expect(200);
    });

    it('calls without a good key from one address, and then does not look at the key', async () => {
      const own = await startTestService();
      const guess = () => supertest(own.app).get('/v1/estimators').set('X-Api-Key', newKeyText('partner').text);
      for (let call = 0; call < mostRefusalsPerMinute; call += 1) expect((await guess()).status).toBe(401);
      const recognise = jest.spyOn(own.services.keys, 'recognise');
      const refused = await guess();
      expect(refused.status).toBe(429);
      expect(refused.body.code).toBe('rate-exceeded');
      expect(recognise).not.toHaveBeenCalled();
      await own.close();
    });

    it('not the calls with a good key by what others behind the same address do wrong', async () => {
      const { key } = await issue({ perMinute: 1000 });
      const calls = await Promise.all(Array.from({ length: mostRefusalsPerMinute * 2 }, () => list(key)));
      expect(new Set(calls.map(({ status }) => status))).toEqual(new Set([200]));
    });
  });

  describe('for pages', () => {
    let embed: Issued;
    beforeAll(async () => void (embed = await issue({ kind: 'embed', label: 'Form', perMinute: 1000 })));
    const askFrom = (origin: string | null, key = embed.key) =>
      origin === null ? ask(key) : ask(key).set('Origin', origin);

    it('answers the partner’s own site, with what the page may read', async () => {
      const answer = await askFrom(site);
      expect(answer.status).toBe(200);
      expect(answer.headers['access-control-allow-origin']).toBe(site);
      expect(answer.headers['vary']).toContain('Origin');
      expect(answer.headers['access-control-expose-headers']).toBe(
        'RateLimit,RateLimit-Policy,Retry-After,X-Request-Id',
      );
      expect(answer.headers).not.toHaveProperty('access-control-allow-credentials');
    });

    it('limits one visitor without limiting the others', async () => {
      const { key } = await issue({ kind: 'embed', label: 'Busy form', perMinute: 1000 });
      const calls = await Promise.all(
        Array.from({ length: mostEmbedCallsPerAddressMinute + 5 }, () => list(key).set('Origin', site)),
      );
      const refused = calls.filter(({ status }) => status === 429);
      expect(refused).toHaveLength(5);
      expect(refused[0].body.code).toBe('rate-exceeded');
      expect(refused[0].headers['access-control-allow-origin']).toBe(site);
      expect((await askFrom(site)).status).toBe(200);
    });

    it.each([
      ['a site that nobody lists', 'https://elsewhere.example'],
      ['a site that differs in its port', `${site}:8443`],
      ['a site that ends like a listed one', 'https://evil-www.partner.example'],
      ['the same name without encryption', 'http://www.partner.example'],
      ['a page without an origin', 'null'],
      ['a call that names no site', null],
    ])('refuses %s', async (_what, origin) => {
      const answer = await askFrom(origin);
      expect(answer.status).toBe(403);
      expect(answer.body.code).toBe('site-not-listed');
      expect(answer.headers).not.toHaveProperty('access-control-allow-origin');
    });

    it('refuses another partner’s site in words that the page can read', async () => {
      const other = 'https://second.example';
      await addPartner(service, desk.administrator.person, other);
      const answer = await askFrom(other);
      expect(answer.body.code).toBe('site-not-listed');
      expect(answer.headers['access-control-allow-origin']).toBe(other);
    });

    it('lets a listed site read what is wrong with its case', async () => {
      const answer = await supertest(service.app)
        .post('/v1/estimators/refit-labour/estimates')
        .set('X-Api-Key', embed.key)
        .set('Origin', site)
        .send({ inputs: {} });
      expect(answer.status).toBe(422);
      expect(answer.headers['access-control-allow-origin']).toBe(site);
    });

    it('answers the preflight of a listed site before any key is known', async () => {
      const preflight = await supertest(service.app)
        .options('/v1/estimators/refit-labour/estimates')
        .set('Origin', site)
        .set('Access-Control-Request-Method', 'POST')
        .set('Access-Control-Request-Headers', 'content-type,x-api-key');
      expect(preflight.status).toBe(204);
      expect(preflight.headers['access-control-allow-origin']).toBe(site);
      expect(preflight.headers['access-control-allow-methods']).toBe('GET,POST');
      expect(preflight.headers['access-control-allow-headers']).toBe('Content-Type,X-Api-Key');
      expect(preflight.headers['access-control-max-age']).toBe('7200');
    });

    it('refuses the preflight of any other site', async () => {
      const preflight = await supertest(service.app)
        .options('/v1/estimators')
        .set('Origin', 'https://elsewhere.example')
        .set('Access-Control-Request-Method', 'GET');
      expect(preflight.status).toBe(403);
      expect(preflight.headers).not.toHaveProperty('access-control-allow-origin');
    });

    it('keeps an embed key to describing and estimating', async () => {
      const { body } = await askFrom(site);
      const answer = await supertest(service.app)
        .get(`/v1/estimates/${body.id}`)
        .set('X-Api-Key', embed.key)
        .set('Origin', site);
      expect(answer.status).toBe(403);
      expect(answer.body.code).toBe('key-out-of-scope');
    });

    it('refuses a partner key in a page, even of a listed site', async () => {
      const { key } = await issue();
      expect((await askFrom(site, key)).body.code).toBe('site-not-listed');
      expect((await askFrom(null, key)).status).toBe(200);
    });
  });
});
