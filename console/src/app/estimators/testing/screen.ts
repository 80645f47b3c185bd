import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting, type TestRequest } from '@angular/common/http/testing';
import { Component, type Provider, type Type } from '@angular/core';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { Router, provideRouter } from '@angular/router';
import type { PersonReference, ProblemDetails, Role } from '../../api/contract';
import { SessionStore } from '../../api/session-store';

@Component({ template: '' })
class Elsewhere {}

/** One screen on the test bed, with the service's answers in the spec's hands. */
export class Screen<Page> {
  private readonly http = TestBed.inject(HttpTestingController);
  private readonly fixture: ComponentFixture<Page>;

  constructor(page: Type<Page>, inputs: Readonly<Record<string, unknown>>) {
    this.fixture = TestBed.createComponent(page);
    for (const [name, value] of Object.entries(inputs)) this.fixture.componentRef.setInput(name, value);
  }

  get url(): string {
    return TestBed.inject(Router).url;
  }

  /** Lets effects, answers and drawing follow. A call in flight keeps the page from being stable, so that is not awaited. */
  async settle(): Promise<void> {
    for (let round = 0; round < 4; round += 1) {
      TestBed.tick();
      await new Promise((resolve) => setTimeout(resolve));
    }
  }

  async answer(url: string, body: object, method = 'GET'): Promise<TestRequest> {
    const request = this.http.expectOne((candidate) => candidate.url === url && candidate.method === method);
    request.flush(body);
    await this.settle();
    return request;
  }

  async refuse(url: string, problem: Partial<ProblemDetails>, method = 'GET'): Promise<void> {
    const whole = {
      type: '/problems/x',
      title: 'It did not work',
      status: 400,
      code: 'request-invalid',
      requestId: 'request1',
      ...problem,
    };
    const request = this.http.expectOne((candidate) => candidate.url === url && candidate.method === method);
    request.flush(whole, { status: whole.status, statusText: 'Refused' });
    await this.settle();
  }

  async press(button: HTMLElement): Promise<void> {
    button.click();
    await this.settle();
  }

  /** The person goes elsewhere. */
  leave(): void {
    this.fixture.destroy();
  }

  /** No call is left that the spec did not answer. */
  verify(): void {
    this.http.verify();
  }
}

/** jsdom has no layout, so nothing ever comes into view. */
class NothingInView {
  readonly observe = (): void => undefined;
  readonly disconnect = (): void => undefined;
}

export async function show<Page>(
  page: Type<Page>,
  inputs: Readonly<Record<string, unknown>>,
  roles: readonly Role[] = ['analyst'],
  providers: readonly Provider[] = [],
  person: PersonReference = { id: 'person00none', name: 'Nobody in particular' },
): Promise<Screen<Page>> {
  Object.defineProperty(globalThis, 'IntersectionObserver', {
    value: NothingInView,
    configurable: true,
    writable: true,
  });
  const people = {
    holds: (...wanted: readonly Role[]) => roles.some((role) => wanted.includes(role)),
    person: () => person,
  };
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      provideRouter([{ path: '**', component: Elsewhere }]),
      { provide: SessionStore, useValue: people },
      { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ...providers,
    ],
  });
  const screen = new Screen(page, inputs);
  await screen.settle();
  return screen;
}
