import supertest from 'supertest';
import { addPartner, boat, openDesk, putInForce, type Desk } from '../support/published-estimator';
import { startTestService, type TestService } from '../support/test-service';

const path = '/v1/estimators/refit-labour/estimates';

describe('estimates', () => {
  let service: TestService;
  let desk: Desk;
  let partnerId: string;
  let key: string;
  let editionId: string;
  beforeAll(async () => {
    service = await startTestService();
    desk = await openDesk(service);
    partnerId = await addPartner(service, desk.administrator.person, 'https://www.partner.example');
    key = await issue({ perMinute: 1000 });
    editionId = await putInForce(desk, desk.fitId);
  });
  afterAll(() => service.close());

  async function issue(terms: object = {}): Promise<string> {
    const answer = await desk.administrator
      .post(`/api/partners/${partnerId}/keys`)
      .send({ kind: 'partner', label: 'Server', ...terms })
      .expect(201);
    return (answer.body as { key: string }).key;
  }

  const ask = (body: object, withKey = key) => supertest(service.app).post(path).set('X-Api-Key', withKey).send(body);

  it('carry value, interval, edition and contributions that add up', async () => {
    const { status, body } = await ask({ inputs: boat });
    expect(status).toBe(200);
    expect(body).toMatchObject({
      estimator: 'refit-labour',
      edition: 1,
      unit: 'h',
      scale: 'original',
      flags: [],
      cautions: ['An estimate is not a quotation.'],
      issuedAt: service.clock.now().toISOString(),
    });
    expect(body.interval.level).toBe(0.9);
    expect(body.interval.low).toBeLessThan(body.value);
    expect(body.interval.high).toBeGreaterThan(body.value);
    const sum = (body.contributions as { contribution: number }[]).reduce(
      (total, part) => total + part.contribution,
      0,
    );
    expect(Math.abs(sum - (body.value - body.typical))).toBeLessThan(1e-9);
    expect(body.contributions.map(({ label }: { label: string }) => label)).toEqual([
      'Length overall',
      'beam',
      'Hull material',
      'ballast',
    ]);
  });

  it('are in the database before they are answered', async () => {
    const { body } = await ask({ inputs: boat });
    const [row] = await service.services.knex('estimates').where({ id: body.id });
    expect(JSON.parse(row.answer as string)).toEqual(body);
    expect(JSON.parse(row.inputs as string)).toEqual(boat);
    expect(row).toMatchObject({ editionId, partnerId, value: body.value, low: body.interval.low, flagCount: 0 });
  });

  it('are not answered when they cannot be kept', async () => {
    const { knex } = service.services;
    await knex.raw(
      "create trigger refuse_estimates before insert on estimates begin select raise(abort, 'the disk is full'); end",
    );
    const refused = await ask({ inputs: boat });
    await knex.raw('drop trigger refuse_estimates');
    expect(refused.status).toBe(500);
    expect(refused.body).not.toHaveProperty('value');
    expect(refused.body).toMatchObject({ code: 'internal', requestId: refused.headers['x-request-id'] });
  });

  it('are the same to the bit for the same case', async () => {
    const [first, second] = [(await ask({ inputs: boat })).body, (await ask({ inputs: boat })).body];
    expect({ ...second, id: first.id }).toEqual(first);
    expect(second.id).not.toBe(first.id);
  });

  it('are flagged outside what the records cover', async () => {
    const { body } = await ask({ inputs: { ...boat, 'length overall': 30 } });
    expect(body.flags[0]).toMatchObject({ code: 'outside-range', input: 'length overall' });
  });

  it('say so when a gap was filled', async () => {
    const { ballast: _ballast, ...without } = boat;
    const { status, body } = await ask({ inputs: without });
    expect(status).toBe(200);
    expect(body.flags).toEqual([{ code: 'missing-filled', input: 'ballast', message: expect.any(String) }]);
  });

  it('are refused for a case that does not fit, with a pointer and advice for each input', async () => {
    const refused = await ask({ inputs: { 'length overall': '11,5', hull: 'concrete', mast: 3 } });
    expect(refused.status).toBe(422);
    expect(refused.body.code).toBe('inputs-invalid');
    expect(refused.body.errors).toEqual(
      expect.arrayContaining([
        { pointer: '#/inputs/beam', detail: 'beam is missing. Give a number in m.' },
        { pointer: '#/inputs/length%20overall', detail: 'Give a number in m.' },
        { pointer: '#/inputs/hull', detail: 'Give one of GRP, steel, wood.' },
        {
          pointer: '#/inputs/mast',
          detail: 'There is no input of this name. The inputs are length overall, beam, hull, ballast.',
        },
      ]),
    );
    expect(refused.body.errors).toHaveLength(4);
  });

  it('are refused for a number too great to be one', async () => {
    const refused = await supertest(service.app)
      .post(path)
      .set('X-Api-Key', key)
      .type('application/json')
      .send(`{"inputs": {"length overall": 1e999, "beam": 4, "hull": "GRP"}}`);
    expect(refused.status).toBe(422);
    expect(refused.body.errors[0].pointer).toBe('#/inputs/length%20overall');
  });

  it('are read back as they were answered, by any key of the same partner', async () => {
    const { body } = await ask({ inputs: boat });
    const read = await supertest(service.app)
      .get(`/v1/estimates/${body.id}`)
      .set('X-Api-Key', await issue());
    expect(read.status).toBe(200);
    expect(read.body).toEqual(body);
  });

  it('are not there for another partner', async () => {
    const { body } = await ask({ inputs: boat });
    const other = await addPartner(service, desk.administrator.person, 'https://other.example');
    const issued = await desk.administrator
      .post(`/api/partners/${other}/keys`)
      .send({ kind: 'partner', label: 'Other' })
      .expect(201);
    const read = await supertest(service.app).get(`/v1/estimates/${body.id}`).set('X-Api-Key', issued.body.key);
    expect(read.status).toBe(404);
    expect(read.body.code).toBe('not-found');
  });

  it('lead the desk back to edition, records and approver', async () => {
    const { body } = await ask({ inputs: boat });
    const traced = await (await service.as('viewer')).get(`/api/estimates/${body.id}`);
    expect(traced.body).toMatchObject({
      ...body,
      inputs: boat,
      editionId,
      approvedBy: { id: desk.reviewer.person.id },
      partner: { id: partnerId },
      key: { label: 'Server', kind: 'partner' },
    });
    expect(traced.body.checksum).toMatch(/^[0-9a-f]{64}$/);
    expect(traced.body.revision.sha256).toMatch(/^[0-9a-f]{64}$/);
  });

  it('are listed for the desk, newest first', async () => {
    service.clock.advance(1000);
    const { body } = await ask({ inputs: boat });
    const listed = await desk.analyst.get('/api/estimators/refit-labour/estimates?limit=1');
    expect(listed.body.items).toEqual([
      expect.objectContaining({ id: body.id, edition: 1, value: body.value, keyLabel: 'Server' }),
    ]);
    expect((await desk.analyst.get('/api/estimators/refit-labour')).body.estimateCount).toBe(listed.body.total);
  });

  describe('of a pinned edition', () => {
    let next: string;
    beforeAll(async () => void (next = await putInForce(desk, desk.fitId)));

    it('go on after it was superseded', async () => {
      expect((await ask({ inputs: boat })).body.edition).toBe(2);
      expect((await ask({ inputs: boat, edition: 1 })).body.edition).toBe(1);
    });

    it('are refused for an edition that was never in force', async () => {
      await desk.analyst
        .post('/api/estimators/refit-labour/editions')
        .send({ fitId: desk.fitId, changeNote: 'Not yet.' })
        .expect(201);
      for (const edition of [3, 99]) expect((await ask({ inputs: boat, edition })).body.code).toBe('edition-unknown');
    });

    it('end at once when it is withdrawn, or at its sunset', async () => {
      await desk.reviewer
        .post(`/api/editions/${editionId}/withdraw`)
        .send({ note: 'Superseded long ago.' })
        .expect(200);
      const gone = await ask({ inputs: boat, edition: 1 });
      expect(gone.status).toBe(410);
      expect(gone.body.code).toBe('edition-withdrawn');

      const sunsetAt = new Date(service.clock.now().getTime() + 60_000).toISOString();
      await desk.reviewer
        .post(`/api/editions/${next}/withdraw`)
        .send({ note: 'A unit was wrong.', sunsetAt })
        .expect(200);
      expect((await ask({ inputs: boat })).body.code).toBe('nothing-in-force');
      expect((await ask({ inputs: boat, edition: 2 })).status).toBe(200);
      service.clock.advance(60_000);
      expect((await ask({ inputs: boat, edition: 2 })).status).toBe(410);
      await putInForce(desk, desk.fitId);
    });
  });

  describe('in a month', () => {
    it('are counted for each key, however many come at once', async () => {
      const limited = await issue({ monthlyQuota: 3 });
      const answers = await Promise.all(Array.from({ length: 6 }, () => ask({ inputs: boat }, limited)));
      expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 200, 429, 429, 429]);
      const refused = answers.find(({ status }) => status === 429);
      expect(refused?.body.code).toBe('quota-exceeded');
      // From 2026-11-03 09:01:01 to the end of November.
      expect(refused?.body.retryAfter).toBe(Math.ceil((Date.UTC(2026, 11) - service.clock.now().getTime()) / 1000));
    });

    it('count only when they are answered', async () => {
      const limited = await issue({ monthlyQuota: 1 });
      expect((await ask({ inputs: {} }, limited)).status).toBe(422);
      expect((await ask({ inputs: boat }, limited)).status).toBe(200);
      expect((await ask({ inputs: boat }, limited)).status).toBe(429);
    });

    it('begin anew in the next', async () => {
      const limited = await issue({ monthlyQuota: 1 });
      await ask({ inputs: boat }, limited).expect(200);
      service.clock.advance(28 * 86_400_000);
      expect((await ask({ inputs: boat }, limited)).status).toBe(200);
    });
  });
});
