import { createHash } from 'node:crypto';
import Ajv2020 from 'ajv/dist/2020';
import { addFit, boat, boatSpecification, openDesk, putInForce, type Desk } from '../support/published-estimator';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

describe('editions', () => {
  let service: TestService;
  let desk: Desk;
  beforeAll(async () => {
    service = await startTestService();
    desk = await openDesk(service);
  });
  afterAll(() => service.close());

  const drawUp = (agent: TestAgent, fitId = desk.fitId) =>
    agent.post('/api/estimators/refit-labour/editions').send({ fitId, changeNote: 'New records.' });

  async function submitted(agent = desk.analyst): Promise<string> {
    const draft = await drawUp(agent).expect(201);
    await agent.post(`/api/editions/${draft.body.id}/submit`).expect(200);
    return draft.body.id as string;
  }

  it('begin as a draft that freezes the fit’s formula with its checksum', async () => {
    const draft = await drawUp(desk.analyst);
    expect(draft.status).toBe(201);
    expect(draft.body).toMatchObject({
      number: 1,
      state: 'draft',
      fitId: desk.fitId,
      method: 'ridge',
      recordCount: 120,
      inputCount: 4,
      scale: 'original',
      cautions: ['An estimate is not a quotation.'],
    });
    const [{ formula, checksum }] = await service.services
      .knex('editions')
      .where({ id: draft.body.id })
      .select('formula', 'checksum');
    const [fit] = await service.services.knex('fits').where({ id: desk.fitId }).select('formula');
    expect(formula).toBe(fit.formula);
    expect(checksum).toBe(createHash('sha256').update(formula, 'utf8').digest('hex'));
    expect(draft.body.checksum).toBe(checksum);
    expect((await desk.analyst.get(`/api/fits/${desk.fitId}`)).body.editions).toEqual([
      { id: draft.body.id, number: 1, state: 'draft' },
    ]);
  });

  it('describe their inputs as JSON Schema with units, ranges and the typical case', async () => {
    const { inputSchema } = (await drawUp(desk.analyst)).body;
    expect(inputSchema.required).toEqual(['length overall', 'beam', 'hull']);
    expect(inputSchema.properties['length overall']).toMatchObject({
      type: 'number',
      title: 'Length overall',
      'x-unit': 'm',
      'x-help': 'Without the bowsprit.',
      'x-order': 1,
    });
    const [least, greatest] = inputSchema.properties.beam['x-range'] as [number, number];
    expect(inputSchema.properties.beam['x-typical']).toBeGreaterThan(least);
    expect(inputSchema.properties.beam['x-typical']).toBeLessThan(greatest);
    expect(inputSchema.properties.hull).toMatchObject({ type: 'string', enum: ['GRP', 'steel', 'wood'] });
    expect(inputSchema.properties.ballast.type).toEqual(['number', 'null']);
    const validate = new Ajv2020({ strict: false, allowUnionTypes: true }).compile(inputSchema);
    expect(validate(boat)).toBe(true);
    expect(validate({ ...boat, ballast: null })).toBe(true);
    expect(validate({ ...boat, mast: 12 })).toBe(false);
  });

  it('are drawn up only from a fit that is done', async () => {
    const { knex } = service.services;
    const other = await addFit(service, desk.analyst, boatSpecification);
    await knex('fits').where({ id: other }).update({ state: 'failed' });
    const refused = await drawUp(desk.analyst, other);
    expect(refused.status).toBe(409);
    expect(refused.body.code).toBe('fit-not-done');
    expect((await drawUp(desk.analyst, 'nosuchfit000000')).status).toBe(404);
  });

  it('are put in force by another person than the one who drew them up or submitted them', async () => {
    const both = await service.as('analyst', 'reviewer');
    const own = await submitted(both);
    const refused = await both.post(`/api/editions/${own}/put-in-force`);
    expect(refused.status).toBe(403);
    expect(refused.body.code).toBe('own-edition');
    expect((await both.get(`/api/editions/${own}`)).body.mayPutInForce).toBe(false);

    const draft = await drawUp(desk.analyst).expect(201);
    await both.post(`/api/editions/${draft.body.id}/submit`).expect(200);
    expect((await both.post(`/api/editions/${draft.body.id}/put-in-force`)).body.code).toBe('own-edition');

    expect((await desk.reviewer.get(`/api/editions/${own}`)).body.mayPutInForce).toBe(true);
    const accepted = await desk.reviewer.post(`/api/editions/${own}/put-in-force`);
    expect(accepted.status).toBe(200);
    expect(accepted.body).toMatchObject({
      state: 'in-force',
      inForceBy: { id: desk.reviewer.person.id },
      mayPutInForce: false,
    });
  });

  it('supersede the edition in force', async () => {
    const first = await putInForce(desk, desk.fitId);
    const second = await putInForce(desk, desk.fitId);
    const before = await desk.analyst.get(`/api/editions/${first}`);
    expect(before.body).toMatchObject({ state: 'superseded', endedAt: service.clock.now().toISOString() });
    expect(before.body.events.map(({ state }: { state: string }) => state)).toEqual([
      'draft',
      'under-review',
      'in-force',
      'superseded',
    ]);
    const estimator = await desk.analyst.get('/api/estimators/refit-labour');
    expect(estimator.body.inForce.id).toBe(second);
  });

  it('come into force one at a time, however many are put in force at once', async () => {
    const ids = [await submitted(), await submitted(), await submitted()];
    const answers = await Promise.all(ids.map((id) => desk.reviewer.post(`/api/editions/${id}/put-in-force`)));
    expect(answers.map(({ status }) => status)).toEqual([200, 200, 200]);
    const inForce = await service.services.knex('editions').where({ state: 'in-force' }).pluck('id');
    expect(inForce).toHaveLength(1);
    expect(ids).toContain(inForce[0]);
  });

  it('are put in force once, when two reviewers press at once', async () => {
    const id = await submitted();
    const second = await service.as('reviewer');
    const answers = await Promise.all(
      [desk.reviewer, second].map((agent) => agent.post(`/api/editions/${id}/put-in-force`)),
    );
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 409]);
    expect(answers.find(({ status }) => status === 409)?.body.code).toBe('edition-state');
    const { body } = await desk.analyst.get(`/api/editions/${id}`);
    expect(body.events.filter(({ state }: { state: string }) => state === 'in-force')).toHaveLength(1);
  });

  it('cannot be two in force, even past the service', async () => {
    const { knex } = service.services;
    const id = await submitted();
    // The driver's errors belong to the worker's first test file, so they are known by their message alone.
    await expect(knex('editions').where({ id }).update({ state: 'in-force' })).rejects.toMatchObject({
      message: expect.stringMatching(/UNIQUE constraint failed/),
    });
  });

  it('are sent back as drafts with a note, and may then be submitted again', async () => {
    const id = await submitted();
    const back = await desk.reviewer
      .post(`/api/editions/${id}/send-back`)
      .send({ note: 'The old records are in metres, not feet.' });
    expect(back.body).toMatchObject({ state: 'draft', submittedAt: null, submittedBy: null });
    expect(back.body.events.at(-1)).toMatchObject({
      by: { id: desk.reviewer.person.id },
      note: 'The old records are in metres, not feet.',
    });
    await desk.analyst.post(`/api/editions/${id}/submit`).expect(200);
  });

  it('tell their state and what can be done instead of what cannot', async () => {
    const draft = await drawUp(desk.analyst).expect(201);
    const refused = await desk.reviewer.post(`/api/editions/${draft.body.id}/put-in-force`);
    expect(refused.status).toBe(409);
    expect(refused.body.code).toBe('edition-state');
    expect(refused.body.detail).toBe(
      `Edition ${draft.body.number} is a draft: it cannot be put in force. It can be submitted for review, or be withdrawn.`,
    );
  });

  it('are withdrawn with a note, for good', async () => {
    const id = await putInForce(desk, desk.fitId);
    const sunsetAt = new Date(service.clock.now().getTime() + 86_400_000).toISOString();
    const withdrawn = await desk.reviewer
      .post(`/api/editions/${id}/withdraw`)
      .send({ note: 'A unit was wrong.', sunsetAt });
    expect(withdrawn.body).toMatchObject({ state: 'withdrawn', sunsetAt });
    expect((await desk.analyst.get('/api/estimators/refit-labour')).body.inForce).toBeNull();
    expect((await desk.reviewer.post(`/api/editions/${id}/withdraw`).send({ note: 'Again.' })).body.code).toBe(
      'edition-state',
    );
    const past = await desk.reviewer
      .post(`/api/editions/${await submitted()}/withdraw`)
      .send({ note: 'Too late.', sunsetAt: '2020-01-01T00:00:00Z' });
    expect(past.body.errors[0].pointer).toBe('#/sunsetAt');
  });

  it('answer a case that is only tried, and keep nothing of it', async () => {
    const draft = await drawUp(desk.analyst).expect(201);
    const tried = await (await service.as('viewer')).post(`/api/editions/${draft.body.id}/try`).send({ inputs: boat });
    expect(tried.status).toBe(200);
    expect(tried.body).toMatchObject({ unit: 'h', scale: 'original', flags: [] });
    expect(await service.services.knex('estimates').count({ total: '*' })).toEqual([{ total: 0 }]);
  });

  it('flag a level that the records never held, where the specification lets it in', async () => {
    const inputs = boatSpecification.inputs.map((input) =>
      input.column === 'hull' ? { ...input, unseen: 'other' } : input,
    );
    const fitId = await addFit(service, desk.analyst, { ...boatSpecification, inputs });
    const draft = await drawUp(desk.analyst, fitId).expect(201);
    const tried = await desk.analyst
      .post(`/api/editions/${draft.body.id}/try`)
      .send({ inputs: { ...boat, hull: 'concrete' } });
    expect(tried.status).toBe(200);
    expect(tried.body.flags).toContainEqual({ code: 'unseen-level', input: 'hull', message: expect.any(String) });
  });

  it('are listed by number, newest first', async () => {
    const { body } = await desk.analyst.get('/api/estimators/refit-labour/editions?limit=2');
    expect(body.items.map(({ number }: { number: number }) => number)).toEqual([body.total, body.total - 1]);
  });

  it('keep an estimator’s unit as it is', async () => {
    const refused = await desk.analyst.patch('/api/estimators/refit-labour').send({ unit: 'min' });
    expect(refused.body.code).toBe('edition-state');
    await desk.analyst.patch('/api/estimators/refit-labour').send({ unit: 'h' }).expect(200);
  });
});
