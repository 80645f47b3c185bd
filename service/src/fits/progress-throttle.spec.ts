import { ProgressThrottle } from './progress-throttle';

describe('progress', () => {
  const passed: number[] = [];
  let throttle: ProgressThrottle<number>;
  beforeEach(() => {
    jest.useFakeTimers();
    passed.length = 0;
    throttle = new ProgressThrottle<number>(200, (value) => passed.push(value));
  });
  afterEach(() => jest.useRealTimers());

  it('is told at once the first time', () => {
    throttle.offer(1);
    expect(passed).toEqual([1]);
  });

  it('is then told every 200 ms, with the newest value only', () => {
    for (const value of [1, 2, 3]) throttle.offer(value);
    jest.advanceTimersByTime(199);
    expect(passed).toEqual([1]);
    jest.advanceTimersByTime(1);
    expect(passed).toEqual([1, 3]);
    throttle.offer(4);
    jest.advanceTimersByTime(200);
    expect(passed).toEqual([1, 3, 4]);
  });

  it('is not told after the fit has ended', () => {
    for (const value of [1, 2]) throttle.offer(value);
    throttle.stop();
    jest.advanceTimersByTime(1000);
    expect(passed).toEqual([1]);
  });
});
