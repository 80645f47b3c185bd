import { pino } from 'pino';
import { Schedule } from './schedule';

const log = pino({ level: 'silent' });
const dayMs = 24 * 60 * 60 * 1000;

describe('the schedule', () => {
  beforeEach(() => void jest.useFakeTimers());
  afterEach(() => void jest.useRealTimers());

  it('runs a job a minute after the start and then at its interval', async () => {
    const run = jest.fn(async () => undefined);
    const schedule = new Schedule([{ name: 'sweep', everyMs: dayMs, run }], log);
    schedule.start();
    await jest.advanceTimersByTimeAsync(59_999);
    expect(run).toHaveBeenCalledTimes(0);
    await jest.advanceTimersByTimeAsync(1);
    expect(run).toHaveBeenCalledTimes(1);
    await jest.advanceTimersByTimeAsync(2 * dayMs);
    expect(run).toHaveBeenCalledTimes(3);
    await schedule.stop();
  });

  it('goes on after a run that failed', async () => {
    const run = jest.fn(async () => {
      throw new Error('the disk is full');
    });
    const schedule = new Schedule([{ name: 'sweep', everyMs: dayMs, run }], log);
    schedule.start();
    await jest.advanceTimersByTimeAsync(2 * dayMs);
    expect(run).toHaveBeenCalledTimes(3);
    await schedule.stop();
  });

  it('never starts a job that is still running, and waits for it when stopped', async () => {
    let finish: () => void = () => undefined;
    const run = jest.fn(() => new Promise<void>((resolve) => (finish = resolve)));
    const schedule = new Schedule([{ name: 'slow', everyMs: dayMs, run }], log);
    schedule.start();
    await jest.advanceTimersByTimeAsync(3 * dayMs);
    expect(run).toHaveBeenCalledTimes(1);
    let stopped = false;
    const stopping = schedule.stop().then(() => (stopped = true));
    await jest.advanceTimersByTimeAsync(dayMs);
    expect([stopped, run.mock.calls.length]).toEqual([false, 1]);
    finish();
    await stopping;
  });
});
