import { pino } from 'pino';
import { DeskError } from '../../service/src/errors';
import { RecordTasks, type TaskContext, type TaskWork } from '../../service/src/records/tasks/record-tasks';
import { RecordTasksStore } from '../../service/src/records/tasks/record-tasks-store';
import { addRevision, boatColumns } from '../support/record-fixture';
import { endOfTask } from '../support/record-task';
import { startTestService, type TestAgent, type TestService } from '../support/test-service';

type Outcome = Awaited<ReturnType<TaskWork['run']>>;

/** Work that goes on until it is let go or stopped. */
class HeldWork implements TaskWork {
  readonly kind = 'bring-in';
  context: TaskContext | null = null;
  letGo: (recordSetId: string) => void = () => undefined;
  clearedUp = false;
  private markBegun: () => void = () => undefined;
  readonly begun = new Promise<void>((resolve) => (this.markBegun = resolve));

  constructor(readonly personId: string) {}

  run(context: TaskContext): Promise<Outcome> {
    this.context = context;
    this.markBegun();
    return new Promise((resolve, reject) => {
      this.letGo = (recordSetId) => resolve({ recordSetId });
      context.signal.addEventListener('abort', () => void this.clearUp().then(() => reject(new Error('stopped'))));
    });
  }

  private async clearUp(): Promise<void> {
    for (let round = 0; round < 20; round++) await new Promise((resolve) => setImmediate(resolve));
    this.clearedUp = true;
  }
}

describe('tasks on records', () => {
  let service: TestService;
  let analyst: TestAgent;
  beforeAll(async () => {
    service = await startTestService();
    analyst = await service.as('analyst');
  });
  afterAll(() => service.close());

  const tasks = () => service.services.recordTasks;
  const held = () => new HeldWork(analyst.person.id);
  const ready = (run: TaskWork['run'] = async () => ({ recordSetId: 'someset1' })): TaskWork => ({
    ...{ kind: 'bring-in', personId: analyst.person.id },
    run,
  });
  const anotherProcess = () =>
    new RecordTasks({
      tasks: new RecordTasksStore(service.services.database),
      clock: service.clock,
      log: pino({ level: 'silent' }),
    });
  const cancel = (id: string) => analyst.post(`/api/record-tasks/${id}/cancel`);

  it('are followed while they wait, run and are done, one after another', async () => {
    const [first, second] = [held(), held()];
    const [one, two] = [await tasks().start(first), await tasks().start(second)];
    await first.begun;
    expect(second.context).toBeNull();
    expect((await analyst.get(`/api/record-tasks/${two.id}`)).body).toMatchObject({
      state: 'queued',
      progress: { stage: 'waiting' },
      createdBy: { id: analyst.person.id },
    });
    first.context?.progress({ stage: 'storing', done: 3, total: 4 });
    first.letGo('someset1');
    expect(await endOfTask(analyst, one.id)).toMatchObject({
      state: 'done',
      progress: { stage: 'storing', done: 3, total: 4 },
      recordSetId: 'someset1',
      revisionId: first.context?.revisionId,
    });
    await second.begun;
    second.letGo('anotherset');
    expect(await endOfTask(analyst, two.id)).toMatchObject({ state: 'done', recordSetId: 'anotherset' });
  });

  it('show how far they are while they run', async () => {
    const work = held();
    const { id } = await tasks().start(work);
    await work.begun;
    work.context?.progress({ stage: 'reading', done: 5, total: 9 });
    for (;;) {
      const { body } = await analyst.get(`/api/record-tasks/${id}`);
      expect(body.state).toBe('running');
      if (body.progress.done === 5) break;
    }
    work.letGo('someset1');
    await endOfTask(analyst, id);
  });

  it('are cancelled at once while they wait, and never begin', async () => {
    const [first, second] = [held(), held()];
    await tasks().start(first);
    const { id } = await tasks().start(second);
    await first.begun;
    expect((await cancel(id)).status).toBe(202);
    expect(await endOfTask(analyst, id)).toMatchObject({ state: 'cancelled', revisionId: null, problem: null });
    first.letGo('someset1');
    await tasks().finish(ready());
    expect(second.context).toBeNull();
  });

  it('are cancelled while they run: the work hears of it, and the next one has its turn', async () => {
    const work = held();
    const { id } = await tasks().start(work);
    await work.begun;
    await cancel(id).expect(202);
    expect(work.context?.signal.aborted).toBe(true);
    expect(await endOfTask(analyst, id)).toMatchObject({ state: 'cancelled', recordSetId: null });
    const again = await cancel(id);
    expect(again.status).toBe(409);
    expect(again.body.code).toBe('task-ended');
    expect(await tasks().finish(ready())).toMatch(/\w+/);
  });

  it('are cancelled from another process', async () => {
    const work = held();
    const { id } = await tasks().start(work);
    await work.begun;
    await anotherProcess().cancel(id);
    expect(await endOfTask(analyst, id)).toMatchObject({ state: 'cancelled' });
    expect(work.context?.signal.aborted).toBe(true);
  });

  it('are cancelled when their caller goes away, and tell the caller so', async () => {
    const caller = new AbortController();
    const work = held();
    const finished = tasks().finish(work, caller.signal);
    await work.begun;
    caller.abort();
    await expect(finished).rejects.toMatchObject({ code: 'body-unreadable' });
    const gone = held();
    await expect(tasks().finish(gone, AbortSignal.abort())).rejects.toMatchObject({ code: 'body-unreadable' });
    expect(gone.context).toBeNull();
  });

  it('tell what was wrong with what they were given', async () => {
    const run = async () => {
      throw new DeskError('file-ragged', 'Line 3 has 1 cell.', { line: 3, errors: [{ pointer: '#/a', detail: 'b' }] });
    };
    const { id } = await tasks().start(ready(run));
    expect(await endOfTask(analyst, id)).toMatchObject({
      state: 'failed',
      problem: {
        code: 'file-ragged',
        detail: 'Line 3 has 1 cell.',
        line: 3,
        errors: [{ pointer: '#/a', detail: 'b' }],
      },
    });
  });

  it('tell of a fault of the service without its inner words', async () => {
    const run = async () => {
      throw new Error('the inner words');
    };
    const { id } = await tasks().start(ready(run));
    const end = await endOfTask(analyst, id);
    expect(end).toMatchObject({ state: 'failed', problem: { code: 'internal' } });
    expect(JSON.stringify(end)).not.toContain('inner words');
  });

  it('show as failed when the process that was at them has died', async () => {
    const work = held();
    const { id } = await anotherProcess().start(work);
    await work.begun;
    service.clock.advance(59_000);
    expect((await analyst.get(`/api/record-tasks/${id}`)).body.state).toBe('running');
    const dead = { saidAt: new Date(service.clock.now().getTime() - 61_000).toISOString() };
    await service.services.knex('recordTasks').where({ id }).update(dead);
    expect((await analyst.get(`/api/record-tasks/${id}`)).body).toMatchObject({
      state: 'failed',
      problem: { code: 'unavailable' },
    });
    expect((await cancel(id)).body.code).toBe('task-ended');
    work.letGo('someset1');
  });

  it('show as done when the process died after the revision was made', async () => {
    const revisionId = await addRevision(service, analyst.person, boatColumns(5));
    const at = service.clock.now().toISOString();
    const progress = { stage: 'storing', done: 1, total: 1 } as const;
    await new RecordTasksStore(service.services.database).insert({
      ...{ id: 'leftbehind', kind: 'mend', state: 'running', progress, revisionId },
      ...{ saidAt: at, createdAt: at, createdBy: analyst.person.id },
    });
    service.clock.advance(61_000);
    const { body } = await analyst.get('/api/record-tasks/leftbehind');
    expect(body).toMatchObject({ state: 'done', revisionId, problem: null });
    expect(body.recordSetId).toMatch(/\w+/);
  });

  it('wait their turn without showing as lost in another process', async () => {
    const [first, second] = [held(), held()];
    await tasks().start(first);
    const { id } = await tasks().start(second);
    await first.begun;
    service.clock.advance(61_000);
    // Told again while it waits.
    while ((await anotherProcess().read(id)).state === 'failed') await new Promise((resolve) => setImmediate(resolve));
    expect(await anotherProcess().read(id)).toMatchObject({ state: 'queued' });
    first.letGo('someset1');
    await second.begun;
    second.letGo('someset1');
    await endOfTask(analyst, id);
  });

  it('are forgotten a week after their end', async () => {
    const { id } = await tasks().start(ready());
    await endOfTask(analyst, id);
    service.clock.advance(6 * 24 * 60 * 60 * 1000);
    await tasks().sweep();
    await analyst.get(`/api/record-tasks/${id}`).expect(200);
    service.clock.advance(2 * 24 * 60 * 60 * 1000);
    await tasks().sweep();
    await analyst.get(`/api/record-tasks/${id}`).expect(404);
  });

  it('are stopped and waited for when the service closes, and say that it was stopped', async () => {
    const [first, second] = [held(), held()];
    const [one, two] = [await tasks().start(first), await tasks().start(second)];
    await first.begun;
    await tasks().close();
    expect(first.clearedUp).toBe(true);
    for (const { id } of [one, two])
      expect((await analyst.get(`/api/record-tasks/${id}`)).body).toMatchObject({
        state: 'failed',
        problem: { code: 'unavailable' },
      });
    expect(second.context).toBeNull();
    await expect(tasks().start(held())).rejects.toMatchObject({ code: 'unavailable' });
  });
});
