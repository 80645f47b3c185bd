import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import supertest from 'supertest';
import { compose } from '../../service/src/compose';
import { addRevision, boatColumns } from '../support/record-fixture';
import {
  fitThreadArguments,
  startTestService,
  testPassword,
  type TestAgent,
  type TestService,
} from '../support/test-service';

const inputs = [{ column: 'length overall' }, { column: 'beam' }, { column: 'hull' }];
const ridge = { target: { column: 'hours' }, inputs, method: 'ridge' };

describe('fits', () => {
  let service: TestService;
  let analyst: TestAgent;
  let revisionId: string;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
    revisionId = await addRevision(service, analyst.person, boatColumns());
    await analyst
      .post('/api/estimators')
      .send({ slug: 'refit-labour', name: 'Refit labour', targetName: 'Labour', unit: 'h' })
      .expect(201);
  });
  afterAll(() => service.close());

  const start = (specification: object) =>
    analyst.post('/api/estimators/refit-labour/fits').send({ revisionId, specification });

  async function finished(specification: object): Promise<string> {
    const accepted = await start(specification).expect(202);
    await service.services.fits.waitFor(accepted.body.id);
    return accepted.body.id as string;
  }

  it('are accepted at once and computed in a thread of their own', async () => {
    const accepted = await start(ridge);
    expect(accepted.status).toBe(202);
    expect(accepted.body).toEqual({ id: expect.any(String), state: 'queued' });
    expect(await service.services.fits.waitFor(accepted.body.id)).toBe('done');
    const { body } = await analyst.get(`/api/fits/${accepted.body.id}`).expect(200);
    expect(body).toMatchObject({ state: 'done', estimator: 'refit-labour', unit: 'h', failure: null, editions: [] });
    expect(
      body.result.weights.map(({ input, level }: { input: string; level: string | null }) => [input, level]),
    ).toEqual([
      ['length overall', null],
      ['beam', null],
      ['hull', 'GRP'],
      ['hull', 'steel'],
      ['hull', 'wood'],
    ]);
    expect(body.result.path).toHaveLength(100);
    expect(body.result.penalty.minimumLambda).toBe(body.result.penalty.lambda);
    expect(body.result.accuracy.rmse).toBeGreaterThan(4);
    expect(body.result.accuracy.rmse).toBeLessThan(8);
  });

  it('give the same bits for the same records, specification and seed', async () => {
    const [first, second] = [await finished(ridge), await finished(ridge)];
    const texts = await service.services.knex('fits').whereIn('id', [first, second]).select('result', 'formula');
    expect(texts[0]).toEqual(texts[1]);
    expect(texts[0].formula).toContain('"format":"tarebeam-formula/1"');
  });

  it('work out the longer things that are asked for', async () => {
    const extras = { nestedFolds: true, selectionSamples: 20, learningCurve: true };
    const [spline, ...others] = inputs;
    const id = await finished({
      ...ridge,
      inputs: [{ ...spline, transform: 'spline', knots: 3 }, ...others],
      method: 'lasso',
      extras,
    });
    const { result } = (await analyst.get(`/api/fits/${id}`).expect(200)).body;
    expect(result.accuracy.nestedRmse).toBeGreaterThan(0);
    expect(result.diagnostics.learningCurve.length).toBeGreaterThan(1);
    expect(result.diagnostics.selectionFrequency.length).toBeGreaterThan(0);
  });

  it('use the records that the filter keeps', async () => {
    const id = await finished({
      ...ridge,
      inputs: inputs.slice(0, 2),
      rowFilter: { column: 'hull', equals: ['steel', 'wood'] },
    });
    const { body } = await analyst.get(`/api/fits/${id}`);
    const kept = boatColumns().flatMap((column) => ('codes' in column ? column.codes.filter((code) => code > 0) : []));
    expect(body.result.report.recordCount).toBe(kept.length);
    expect(kept.length).toBeLessThan(120);
  });

  it('are listed newest first, with what was chosen', async () => {
    service.clock.advance(1000);
    const newest = await finished({ ...ridge, penalty: { rule: 'fixed', value: 0.5 } });
    const { body } = await analyst.get('/api/estimators/refit-labour/fits?limit=2');
    expect(body.items[0]).toMatchObject({
      id: newest,
      state: 'done',
      method: 'ridge',
      rule: 'fixed',
      inputCount: 3,
      lambda: 0.5,
    });
    expect(body.items).toHaveLength(2);
    expect(body.total).toBeGreaterThan(2);
  });

  it('point at every column that does not fit, before anything is queued', async () => {
    const wrong = await start({
      target: { column: 'hull' },
      inputs: [
        { column: 'keel' },
        { column: 'hull', transform: 'spline' },
        { column: 'beam' },
        { column: 'beam' },
        { column: 'ballast' },
      ],
      weightColumn: 'oars',
      method: 'ridge',
      validation: { scheme: 'grouped' },
    });
    expect(wrong.status).toBe(422);
    expect(wrong.body.code).toBe('specification-invalid');
    expect(wrong.body.errors.map(({ pointer }: { pointer: string }) => pointer)).toEqual([
      '#/specification/target/column',
      '#/specification/inputs/0/column',
      '#/specification/inputs/1/column',
      '#/specification/inputs/3/column',
      '#/specification/weightColumn',
      '#/specification/validation/column',
    ]);
  });

  it.each([
    [
      'a transform of a category',
      { ...ridge, inputs: [{ column: 'hull', transform: 'spline' }] },
      '#/specification/inputs/0/transform',
    ],
    ['gaps that are refused', { ...ridge, inputs: [{ column: 'ballast' }] }, '#/specification/inputs/0/missing'],
    [
      'a penalty rule that the method lacks',
      { ...ridge, method: 'lasso', penalty: { rule: 'evidence' } },
      '#/specification/penalty',
    ],
    ['a range over words', { ...ridge, rowFilter: { column: 'hull', from: 1 } }, '#/specification/rowFilter'],
    [
      'a filter on no column',
      { ...ridge, rowFilter: { column: 'keel', equals: ['long'] } },
      '#/specification/rowFilter/column',
    ],
    ['a fixed penalty without its value', { ...ridge, penalty: { rule: 'fixed' } }, '#/specification/penalty'],
  ])('are refused for %s', async (_what, specification, pointer) => {
    const wrong = await start(specification);
    expect(wrong.body.errors).toEqual([{ pointer, detail: expect.any(String) }]);
  });

  it('need a revision that exists', async () => {
    const wrong = await analyst
      .post('/api/estimators/refit-labour/fits')
      .send({ revisionId: 'nosuchrevision00', specification: ridge });
    expect(wrong.body).toMatchObject({ code: 'specification-invalid', errors: [{ pointer: '#/revisionId' }] });
  });

  it('keep why they failed, in the engine’s words', async () => {
    const id = await finished({ ...ridge, inputs: [{ column: 'beam', transform: 'log' }], weightColumn: 'ballast' });
    const { body } = await analyst.get(`/api/fits/${id}`);
    expect(body.state).toBe('failed');
    expect(body.failure).toMatchObject({ code: 'weights-not-usable', column: 'ballast' });
    expect(body.result).toBeNull();
  });

  it('are cancelled while they wait', async () => {
    const running = await start(ridge).expect(202);
    const waiting = await start(ridge).expect(202);
    const cancelled = await analyst.post(`/api/fits/${waiting.body.id}/cancel`);
    expect(cancelled.status).toBe(202);
    expect(cancelled.body.state).toBe('cancelled');
    await service.services.fits.waitFor(running.body.id);
    const again = await analyst.post(`/api/fits/${waiting.body.id}/cancel`);
    expect(again.status).toBe(409);
    expect(again.body.code).toBe('fit-ended');
  });

  it('are cancelled while they run, by ending their thread', async () => {
    const big = await addRevision(service, analyst.person, boatColumns(60_000));
    const spline = {
      ...ridge,
      inputs: inputs.map((input) => (input.column === 'hull' ? input : { ...input, transform: 'spline' })),
    };
    const accepted = await analyst
      .post('/api/estimators/refit-labour/fits')
      .send({ revisionId: big, specification: spline })
      .expect(202);
    const { id } = accepted.body as { id: string };
    while ((await service.services.fits.progress(id)).state === 'queued')
      await new Promise((resolve) => setTimeout(resolve, 5));
    expect((await service.services.fits.progress(id)).state).toBe('running');
    await analyst.post(`/api/fits/${id}/cancel`).expect(202);
    expect(await service.services.fits.waitFor(id)).toBe('cancelled');
    const { body } = await analyst.get(`/api/fits/${id}`);
    expect(body).toMatchObject({ state: 'cancelled', result: null });
  });

  it('left by a process that ended are run again', async () => {
    const { knex, fitRunner, fits } = service.services;
    const accepted = await start(ridge).expect(202);
    const { id } = accepted.body as { id: string };
    await fits.waitFor(id);
    const orphan = {
      state: 'running',
      claimedBy: 'elsewhere:1:gone',
      claimedAt: service.clock.now().toISOString(),
      result: null,
      formula: null,
    };
    await knex('fits').where({ id }).update(orphan);
    fitRunner.wake();
    await new Promise((resolve) => setTimeout(resolve, 50));
    expect((await fits.progress(id)).state).toBe('running');
    service.clock.advance(31_000);
    fitRunner.wake();
    expect(await fits.waitFor(id)).toBe('done');
  });

  it('are run once each when several processes share the database', async () => {
    const { config, log, knex, fits, fitRunner } = service.services;
    const second = compose({ config, log, clock: service.clock, sessionCleanupMs: 0, fitThreadArguments });
    const ids: string[] = [];
    for (let count = 0; count < 4; count += 1) ids.push(((await start(ridge).expect(202)).body as { id: string }).id);
    for (const runner of [fitRunner, second.fitRunner, fitRunner, second.fitRunner]) runner.wake();
    expect(await Promise.all(ids.map((id) => second.fits.waitFor(id)))).toEqual(['done', 'done', 'done', 'done']);
    await Promise.all(ids.map((id) => fits.waitFor(id)));
    const done = await knex('journal').where({ action: 'fit-done' }).whereIn('subjectId', ids).select('subjectId');
    expect(done.map(({ subjectId }) => subjectId as string).sort()).toEqual(ids.sort());
    await second.close();
  });

  it('are cancelled by a process that does not run them', async () => {
    const { config, log, fits } = service.services;
    const second = compose({ config, log, clock: service.clock, sessionCleanupMs: 0, fitThreadArguments });
    const big = await addRevision(service, analyst.person, boatColumns(400_000));
    const specification = {
      ...ridge,
      inputs: inputs.map((input) => ({ ...input, transform: input.column === 'hull' ? 'none' : 'spline' })),
    };
    const accepted = await analyst
      .post('/api/estimators/refit-labour/fits')
      .send({ revisionId: big, specification })
      .expect(202);
    const { id } = accepted.body as { id: string };
    while ((await fits.progress(id)).state === 'queued') await new Promise((resolve) => setTimeout(resolve, 5));
    const cancelled = await second.fits.cancel({ ...analyst.person, roles: ['analyst'], partnerId: null }, id);
    expect(cancelled.state).toBe('running');
    expect(await second.fits.waitFor(id)).toBe('cancelled');
    await second.close();
  });

  it('go back into the queue when the service closes', async () => {
    const other = await startTestService();
    const person = await other.as('analyst');
    await person
      .post('/api/estimators')
      .send({ slug: 'refit-labour', name: 'Refit labour', targetName: 'Labour', unit: 'h' })
      .expect(201);
    const big = await addRevision(other, person.person, boatColumns(60_000));
    const accepted = await person
      .post('/api/estimators/refit-labour/fits')
      .send({ revisionId: big, specification: ridge })
      .expect(202);
    while ((await other.services.fits.progress(accepted.body.id)).state === 'queued')
      await new Promise((resolve) => setTimeout(resolve, 5));
    await other.services.fitRunner.close();
    expect((await other.services.fits.progress(accepted.body.id)).state).toBe('queued');
    await other.close();
  });

  describe('are followed', () => {
    let server: Server;
    let address: string;
    beforeAll(async () => {
      server = createServer(service.app);
      await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
      address = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
    });
    afterAll(() => new Promise((resolve) => server.close(resolve)));

    async function cookieOf(): Promise<string> {
      const signedIn = await supertest(address)
        .post('/api/session')
        .send({ email: analyst.person.email, password: testPassword })
        .expect(200);
      return (signedIn.headers['set-cookie'] as unknown as string[]).map((line) => line.split(';')[0]).join('; ');
    }

    async function stream(
      id: string,
    ): Promise<{ readonly type: string | null; readonly steps: readonly { state: string; progress: unknown }[] }> {
      const answer = await fetch(`${address}/api/fits/${id}/progress`, { headers: { cookie: await cookieOf() } });
      const text = await answer.text();
      const steps = [...text.matchAll(/^event: progress\ndata: (.*)$/gm)].map(
        (match) => JSON.parse(match[1]) as { state: string; progress: unknown },
      );
      return { type: answer.headers.get('content-type'), steps };
    }

    it('as events that fit the contract, until the final state ends the stream', async () => {
      const accepted = await start(ridge).expect(202);
      const { type, steps } = await stream(accepted.body.id);
      expect(type).toContain('text/event-stream');
      expect(steps.at(-1)?.state).toBe('done');
      const validate = service.services.deskContract.schemaValidator('FitProgressEvent');
      for (const step of steps) expect(validate(step)).toBe(true);
    });

    it('at once with the final state when they have ended', async () => {
      const id = await finished(ridge);
      expect((await stream(id)).steps).toEqual([{ state: 'done', progress: { stage: 'done', done: 1, total: 1 } }]);
    });

    it('only where there is one', async () => {
      expect((await analyst.get('/api/fits/nosuchfit000000/progress')).status).toBe(404);
    });
  });
});
