import { HttpErrorResponse } from '@angular/common/http';
import { Component, signal } from '@angular/core';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { Observable, Subject } from 'rxjs';
import { load } from './load';

/** One subject a request, so that a spec decides when each answers and sees which were given up. */
const requests: { readonly id: string; readonly answer: Subject<string> }[] = [];

function request(id: string): Observable<string> {
  const answer = new Subject<string>();
  requests.push({ id, answer });
  return answer;
}

@Component({ template: '{{ sheet.state() }}' })
class Screen {
  readonly id = signal('a');
  readonly sheet = load(() => (this.id() === '' ? undefined : request(this.id())));
}

describe('load', () => {
  let fixture: ComponentFixture<Screen>;
  let screen: Screen;
  const last = (): (typeof requests)[number] => requests[requests.length - 1];

  beforeEach(async () => {
    requests.length = 0;
    fixture = TestBed.createComponent(Screen);
    screen = fixture.componentInstance;
    await fixture.whenStable();
  });

  it('is loading, then ready with the answer', () => {
    expect(screen.sheet.state()).toBe('loading');
    last().answer.next('first');
    expect(screen.sheet.state()).toBe('ready');
    expect(screen.sheet.value()).toBe('first');
  });

  it('keeps the problem, and asks again on reload', async () => {
    last().answer.error(new HttpErrorResponse({ status: 0 }));
    expect(screen.sheet.state()).toBe('error');
    expect(screen.sheet.problem()?.code).toBe('unreachable');
    screen.sheet.reload();
    await fixture.whenStable();
    expect(screen.sheet.state()).toBe('loading');
    last().answer.next('second');
    expect(screen.sheet.state()).toBe('ready');
    expect(screen.sheet.problem()).toBeUndefined();
  });

  it('lets the older answer stand while a newer one is on its way', async () => {
    last().answer.next('first');
    screen.sheet.reload();
    await fixture.whenStable();
    expect(screen.sheet.state()).toBe('ready');
    expect(screen.sheet.reloading()).toBe(true);
    expect(screen.sheet.value()).toBe('first');
  });

  it('gives the earlier request up when what it depends on changes', async () => {
    const first = last().answer;
    screen.id.set('b');
    await fixture.whenStable();
    expect(last().id).toBe('b');
    expect(first.observed).toBe(false);
  });

  it('waits while there is nothing to ask', async () => {
    screen.id.set('');
    await fixture.whenStable();
    expect(requests).toHaveLength(1);
  });

  it('gives the request up when the screen goes', () => {
    const { answer } = last();
    fixture.destroy();
    expect(answer.observed).toBe(false);
  });
});
