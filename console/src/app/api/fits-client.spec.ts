import { provideHttpClient } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import type { FitProgressEvent } from './contract';
import { OPEN_EVENT_SOURCE } from './event-source';
import { FitsClient } from './fits-client';

/** The browser's EventSource, driven by hand. jsdom has none. */
class HandDrivenSource extends EventTarget {
  readyState = 1;
  closed = false;

  constructor(readonly url: string) {
    super();
  }

  close(): void {
    this.closed = true;
  }

  step(step: FitProgressEvent): void {
    this.dispatchEvent(new MessageEvent('progress', { data: JSON.stringify(step) }));
  }

  fail(readyState: number): void {
    this.readyState = readyState;
    this.dispatchEvent(new Event('error'));
  }
}

describe('FitsClient.follow', () => {
  let source: HandDrivenSource;
  let client: FitsClient;
  const seen: FitProgressEvent[] = [];
  const complete = jest.fn();

  beforeEach(() => {
    seen.length = 0;
    complete.mockReset();
    const open = (url: string): EventSource => (source = new HandDrivenSource(url)) as unknown as EventSource;
    TestBed.configureTestingModule({
      providers: [provideHttpClient(), { provide: OPEN_EVENT_SOURCE, useValue: open }],
    });
    client = TestBed.inject(FitsClient);
    (globalThis as { EventSource?: unknown }).EventSource ??= { CONNECTING: 0, OPEN: 1, CLOSED: 2 };
  });

  function follow(): { unsubscribe(): void } {
    return client.follow('fit00001').subscribe({ next: (step) => seen.push(step), complete });
  }

  it('passes every step on and ends with the final state', () => {
    follow();
    source.step({ state: 'running', progress: { stage: 'folds', done: 3, total: 10 } });
    source.step({ state: 'done', progress: { stage: 'done', done: 10, total: 10 } });
    expect(source.url).toBe('/api/fits/fit00001/progress');
    expect(seen.map(({ state }) => state)).toEqual(['running', 'done']);
    expect(complete).toHaveBeenCalledTimes(1);
    expect(source.closed).toBe(true);
  });

  it('leaves a dropped stream to the browser, which reconnects', () => {
    follow();
    source.fail(0);
    expect(complete).not.toHaveBeenCalled();
    expect(source.closed).toBe(false);
  });

  it('completes when the browser has given up', () => {
    follow();
    source.fail(2);
    expect(complete).toHaveBeenCalledTimes(1);
  });

  it('closes the stream when nobody listens any more', () => {
    follow().unsubscribe();
    expect(source.closed).toBe(true);
  });
});
