import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, TestRequest, provideHttpClientTesting } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import type { RecordTask } from './contract';
import { RecordTasksClient } from './record-tasks-client';

const PATH = '/api/record-tasks/task1';
const TASK: RecordTask = {
  id: 'task1',
  kind: 'bring-in',
  state: 'running',
  progress: { stage: 'reading', done: 120e6, total: 250e6 },
  recordSetId: null,
  revisionId: null,
  problem: null,
  createdAt: '2026-12-01T09:00:00Z',
  createdBy: { id: 'person01', name: 'Ines Caldwell' },
};

describe('RecordTasksClient.follow', () => {
  let http: HttpTestingController;
  let seen: string[];
  let ending: unknown;
  let stop: () => void;

  beforeEach(() => {
    jest.useFakeTimers();
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
    http = TestBed.inject(HttpTestingController);
    seen = [];
    ending = undefined;
    const subscription = TestBed.inject(RecordTasksClient)
      .follow('task1')
      .subscribe({
        next: ({ state }) => seen.push(state),
        error: (error: { status: number }) => (ending = error.status),
        complete: () => (ending = 'complete'),
      });
    stop = () => subscription.unsubscribe();
    jest.advanceTimersByTime(0);
  });

  afterEach(() => {
    stop();
    http.verify();
    jest.useRealTimers();
  });

  const call = (): TestRequest => http.expectOne(PATH);

  it('asks again after half a second, until the work has ended', () => {
    call().flush(TASK);
    jest.advanceTimersByTime(500);
    call().flush({ ...TASK, state: 'done', revisionId: 'revision1' });
    jest.advanceTimersByTime(5000);
    expect(seen).toEqual(['running', 'done']);
    expect(ending).toBe('complete');
  });

  it('never asks twice at once when an answer is slow', () => {
    const slow = call();
    jest.advanceTimersByTime(3000);
    http.expectNone(PATH);
    slow.flush({ ...TASK, state: 'cancelled' });
    expect(seen).toEqual(['cancelled']);
  });

  it('waits for a connection that broke, since the work goes on', () => {
    call().error(new ProgressEvent('error'), { status: 0, statusText: '' });
    jest.advanceTimersByTime(2100);
    call().flush(TASK);
    expect(seen).toEqual(['running']);
    expect(ending).toBeUndefined();
  });

  it('gives up at once on a task that is not there', () => {
    call().flush({ code: 'not-found', title: 'Nothing here' }, { status: 404, statusText: 'Not found' });
    expect(ending).toBe(404);
  });

  it('stops asking when nobody watches', () => {
    call().flush(TASK);
    stop();
    jest.advanceTimersByTime(5000);
    http.expectNone(PATH);
    expect(seen).toEqual(['running']);
  });
});
