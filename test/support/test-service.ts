import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Express } from 'express';
import { pino } from 'pino';
import supertest from 'supertest';
import { createApp } from '../../service/src/app';
import { compose, databasePathOf, type ComposeOptions, type Services } from '../../service/src/compose';
import { readConfig } from '../../service/src/config';
import { newId } from '../../service/src/database/new-id';
import { hashPassword } from '../../service/src/people/password';
import type { Role } from '../../service/src/people/person';
import { copyTemplateDatabase } from './template-database';

// Passwords are slow to check on purpose, and a fit starts a thread.
jest.setTimeout(60_000);

export const testPassword = 'grey heron on the slip';

/** A fit's thread reads TypeScript too. */
export const fitThreadArguments = ['-r', join(__dirname, 'typescript-hook.js')];

/** A clock that stands still until a test moves it. */
export class TestClock {
  constructor(private time = Date.parse('2026-11-03T09:00:00.000Z')) {}
  now(): Date {
    return new Date(this.time);
  }
  advance(milliseconds: number): void {
    this.time += milliseconds;
  }
}

export interface TestService {
  readonly app: Express;
  readonly services: Services;
  readonly clock: TestClock;
  addPerson(
    roles: readonly Role[],
    options?: { readonly name?: string; readonly partnerId?: string },
  ): Promise<TestPerson>;
  /** Signs in and gives an agent that carries the cookie and the CSRF header. */
  signIn(person: TestPerson): Promise<TestAgent>;
  /** The two together. */
  as(...roles: Role[]): Promise<TestAgent>;
  close(): Promise<void>;
}

export interface TestPerson {
  readonly id: string;
  readonly email: string;
  readonly name: string;
}

export interface TestAgent {
  readonly person: TestPerson;
  get(path: string): supertest.Test;
  post(path: string): supertest.Test;
  patch(path: string): supertest.Test;
  put(path: string): supertest.Test;
  delete(path: string): supertest.Test;
}

// One hash for all test people: half a second each would add up.
let passwordHash: Promise<string> | undefined;

/** The service over a fresh copy of the migrated template, every answer checked against the contract. */
export async function startTestService(
  options: Partial<Pick<ComposeOptions, 'maximumFileBytes' | 'log'>> = {},
): Promise<TestService> {
  const folder = mkdtempSync(join(tmpdir(), 'tarebeam-api-'));
  const config = readConfig({ DATA_DIR: folder, DEMO: 'off', SESSION_SECRET: 'a secret that only the tests know of' });
  await copyTemplateDatabase(databasePathOf(config));
  const clock = new TestClock();
  const services = compose({
    config,
    log: pino({ level: 'silent' }),
    clock,
    validateAnswers: true,
    sessionCleanupMs: 0,
    fitThreadArguments,
    ...options,
  });
  const app = createApp(services);

  async function addPerson(
    roles: readonly Role[],
    options: { name?: string; partnerId?: string } = {},
  ): Promise<TestPerson> {
    passwordHash ??= hashPassword(testPassword);
    const id = newId();
    const person = { id, name: options.name ?? `Person ${id.slice(0, 4)}`, email: `${id}@desk.example` };
    await services.people.insert({
      ...person,
      roles,
      partnerId: options.partnerId ?? null,
      state: 'active',
      passwordHash: await passwordHash,
      createdAt: clock.now().toISOString(),
    });
    return person;
  }

  async function signIn(person: TestPerson): Promise<TestAgent> {
    const agent = supertest.agent(app);
    const answer = await agent.post('/api/session').send({ email: person.email, password: testPassword }).expect(200);
    const token = (answer.body as { csrfToken: string }).csrfToken;
    return {
      person,
      get: (path) => agent.get(path),
      post: (path) => agent.post(path).set('X-XSRF-TOKEN', token),
      patch: (path) => agent.patch(path).set('X-XSRF-TOKEN', token),
      put: (path) => agent.put(path).set('X-XSRF-TOKEN', token),
      delete: (path) => agent.delete(path).set('X-XSRF-TOKEN', token),
    };
  }

  return {
    app,
    services,
    clock,
    addPerson,
    signIn,
    as: async (...roles) => signIn(await addPerson(roles)),
    close: async () => {
      await services.close();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}
