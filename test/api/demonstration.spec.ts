import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { buffer } from 'node:stream/consumers';
import { pino } from 'pino';
import supertest from 'supertest';
import { createApp } from '../../service/src/app';
import { compose, databasePathOf, type Services } from '../../service/src/compose';
import { readConfig, type Config } from '../../service/src/config';
import { ensureDemonstration, type DemonstrationOptions } from '../../service/src/demonstration/demonstration';
import type { DemonstrationNote } from '../../service/src/demonstration/note';
import { listPartnerPage } from '../../service/src/demonstration/partner-page-site';
import { startTestService } from '../support/test-service';

jest.setTimeout(180_000);

const log = pino({ level: 'silent' });
const told: string[] = [];
const threadArguments = ['-r', join(__dirname, '..', 'support', 'typescript-hook.js')];
const optionsOf = (config: Config): DemonstrationOptions => ({
  config,
  log,
  now: new Date(),
  tell: (line) => void told.push(line),
  threadArguments,
});

describe('the demonstration', () => {
  let folder: string;
  let config: Config;
  let services: Services;
  let note: DemonstrationNote;

  beforeAll(async () => {
    folder = mkdtempSync(join(tmpdir(), 'tarebeam-demonstration-'));
    config = readConfig({ DATA_DIR: folder, SESSION_SECRET: 'a secret that only the tests know of' });
    mkdirSync(join(folder, 'demonstration-draft'));
    writeFileSync(join(folder, 'demonstration-draft', 'tarebeam.sqlite'), 'left by a crash');
    const made = await ensureDemonstration(optionsOf(config));
    if (!made) throw new Error('The demonstration was not made.');
    note = made;
    services = compose({
      config,
      log,
      validateAnswers: true,
      sessionCleanupMs: 0,
      fitThreadArguments: threadArguments,
    });
  });
  afterAll(async () => {
    await services?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  const ask = (key: string, origin?: string) => {
    const call = supertest(createApp(services))
      .post(`/v1/estimators/${note.estimator}/estimates`)
      .set('X-Api-Key', key);
    return (origin === undefined ? call : call.set('Origin', origin)).send({ inputs: note.exampleInputs });
  };

  it('leaves no draft behind, and files with keys are for their owner alone', () => {
    expect(existsSync(join(folder, 'demonstration-draft'))).toBe(false);
    for (const file of ['demonstration.json', 'partner-page.json'])
      expect(statSync(join(folder, file)).mode & 0o777).toBe(0o600);
  });

  it('tells how far it is', () => {
    expect(told[0]).toContain('Filling the demonstration');
    expect(told.at(-1)).toMatch(/ready after \d+ s/);
  });

  it('lets every kind of person sign in with the published password', async () => {
    const roles = new Set(note.people.flatMap((person) => person.roles));
    expect([...roles].sort()).toEqual(['administrator', 'analyst', 'partner-developer', 'reviewer', 'viewer']);
    const app = createApp(services);
    for (const role of roles) {
      const person = note.people.find((candidate) => candidate.roles.includes(role));
      const session = await supertest(app).post('/api/session').send({ email: person?.email, password: note.password });
      expect([session.status, session.body.person?.name]).toEqual([200, person?.name]);
    }
  });

  it('has an edition in force for each estimator, drawn up by one person and approved by another', async () => {
    const editions = await services.knex('editions').where({ state: 'in-force' });
    expect(editions).toHaveLength(3);
    for (const edition of editions) expect(edition.inForceBy).not.toBe(edition.submittedBy);
  });

  it('has a history of refit labour with one edition waiting for review', async () => {
    const editions = await services
      .knex('editions')
      .join('estimators', 'estimators.id', 'editions.estimatorId')
      .where({ slug: 'refit-labour' })
      .orderBy('number')
      .select('number', 'state');
    expect(editions.map(({ number, state }) => [number, state])).toEqual([
      [1, 'superseded'],
      [2, 'superseded'],
      [3, 'in-force'],
      [4, 'under-review'],
    ]);
  });

  it('answered thousands of estimates, each by the edition that was in force at its time', async () => {
    const rows = await services
      .knex('estimates')
      .join('editions', 'editions.id', 'estimates.editionId')
      .select('estimates.issuedAt', 'editions.inForceAt', 'editions.endedAt');
    expect(rows.length).toBeGreaterThan(3000);
    const outside = rows.filter(
      (row) => row.issuedAt < row.inForceAt || (row.endedAt !== null && row.issuedAt > row.endedAt),
    );
    expect(outside).toEqual([]);
  });

  it('counted every estimate against its key', async () => {
    const [{ counted }] = await services.knex('keyMonths').sum({ counted: 'estimateCount' });
    const [{ kept }] = await services.knex('estimates').count({ kept: '*' });
    expect(counted).toBe(kept);
  });

  it('tells its story in the order of time, and nothing in it is yet to come', async () => {
    const times: string[] = await services.knex('journal').orderBy('id').pluck('at');
    expect(times).toEqual([...times].sort());
    expect(times.at(-1)! <= new Date().toISOString()).toBe(true);
  });

  it('has nobody at the desk work at weekends', async () => {
    const times: string[] = await services.knex('journal').whereNot({ action: 'signed-in' }).pluck('at');
    const days = new Set(times.map((time) => new Date(time).getUTCDay()));
    expect([...days].filter((day) => day === 0 || day === 6)).toEqual([]);
  });

  it('left out no job: every fit is done', async () => {
    expect(new Set(await services.knex('fits').pluck('state'))).toEqual(new Set(['done']));
  });

  it('kept the files that were brought in, byte for byte', async () => {
    const revisions = await services.knex('recordRevisions');
    expect(revisions).toHaveLength(9);
    for (const { id, sha256 } of revisions) {
      const { bytes } = await services.records.original(id);
      expect(
        createHash('sha256')
          .update(await buffer(bytes))
          .digest('hex'),
      ).toBe(sha256);
    }
  });

  it('has records that came with faults, their mending beside them, and a newest file with faults still to find', async () => {
    const [{ id }] = await services.knex('recordSets').where({ name: 'Refits' });
    const { revisions } = await services.records.readSet(id);
    const found: Record<number, string[]> = {};
    for (const revision of revisions) {
      const { items } = await services.recordFindings.list(revision.id, undefined);
      const mendable = ['unit-mix-up', 'levels-alike', 'repeated-rows'];
      found[revision.number] = mendable.filter((kind) => items.some((item) => item.kind === kind));
    }
    const all = ['unit-mix-up', 'levels-alike', 'repeated-rows'];
    expect(found).toEqual({ 1: all, 2: [], 3: all, 4: [], 5: all });
    expect(revisions.map(({ origin, basedOn }) => [origin, basedOn?.number])).toEqual([
      ['appended', 3],
      ['mended', 3],
      ['appended', 1],
      ['mended', 1],
      ['file', undefined],
    ]);
  });

  it('has a call ready that returns an estimate', async () => {
    const answer = await ask(note.partnerKey);
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({ estimator: 'refit-labour', edition: 3, unit: 'h', flags: [] });
  });

  it('has an embed key that works from the sample page and from nowhere else', async () => {
    expect((await ask(note.embedKey, config.partnerPageUrl)).status).toBe(200);
    expect((await ask(note.embedKey, 'https://elsewhere.example')).body.code).toBe('site-not-listed');
  });

  it('lists the sample page anew when it moves to another port', async () => {
    const moved = { ...services, config: { ...config, partnerPageUrl: 'http://localhost:4435' } };
    const after = await listPartnerPage(moved, note);
    expect((await ask(after.embedKey, 'http://localhost:4435')).status).toBe(200);
    expect(await ensureDemonstration(optionsOf(config))).toEqual(after);
  });

  it('is made once', async () => {
    const before = statSync(databasePathOf(config)).ino;
    expect(await ensureDemonstration(optionsOf(config))).toMatchObject({ partnerKey: note.partnerKey });
    expect(statSync(databasePathOf(config)).ino).toBe(before);
  });
});

describe('a database with somebody’s own work', () => {
  it('is left alone', async () => {
    const service = await startTestService();
    const person = await service.addPerson(['administrator']);
    expect(await ensureDemonstration(optionsOf(service.services.config))).toBeNull();
    expect(await service.services.knex('people').pluck('id')).toEqual([person.id]);
    await service.close();
  });
});
