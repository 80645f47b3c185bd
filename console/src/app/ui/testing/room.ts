import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, TestRequest, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { MATERIAL_ANIMATIONS } from '@angular/material/core';
import { Router, Routes, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { ProblemDetails, SessionPerson } from '../../api/contract';
import { SessionStore } from '../../api/session-store';
import { controlOf, named, wordsOf } from './queries';

// The first test of a file compiles the section's lazy screens, which takes seconds on a busy machine.
jest.setTimeout(60_000);

@Component({ template: 'elsewhere' })
class Elsewhere {}

export const INES: SessionPerson = {
  id: 'person00ines',
  name: 'Ines Caldwell',
  email: 'ines@marlbay.example',
  roles: ['administrator'],
  partnerId: null,
};

export interface RoomRequest {
  /** Where the room's routes stand, such as `partners`. */
  readonly path: string;
  readonly routes: Routes;
  readonly address: string;
  readonly person?: Partial<SessionPerson>;
}

/** One section opened at an address by somebody signed in, with the service's answers in the spec's hands. */
export class Room {
  private constructor(
    private readonly harness: RouterTestingHarness,
    private readonly http: HttpTestingController,
  ) {}

  static async open({ path, routes, address, person = {} }: RoomRequest): Promise<Room> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path, children: routes },
            { path: '**', component: Elsewhere },
          ],
          withComponentInputBinding(),
        ),
        { provide: MATERIAL_ANIMATIONS, useValue: { animationsDisabled: true } },
      ],
    });
    const http = TestBed.inject(HttpTestingController);
    TestBed.inject(SessionStore).ensure().subscribe();
    http
      .expectOne('/api/session')
      .flush({ person: { ...INES, ...person }, csrfToken: 'token', deskName: 'Marl Bay Yard Federation' });
    const room = new Room(await RouterTestingHarness.create(), http);
    // A guard may wait for an answer that only the spec can give, so the way there is not awaited.
    void TestBed.inject(Router).navigateByUrl(address);
    await room.settle();
    return room;
  }

  /** The whole document: dialogs stand outside the page. */
  get page(): HTMLElement {
    return document.body;
  }

  get text(): string {
    return wordsOf(this.page);
  }

  get address(): string {
    return TestBed.inject(Router).url;
  }

  /** Lazy screens, effects and drawing follow one another; a few turns let them all come to rest. */
  async settle(): Promise<void> {
    for (let turn = 0; turn < 4; turn += 1) {
      await new Promise((resolve) => setTimeout(resolve));
      await this.harness.fixture.whenStable();
    }
  }

  async answer(path: string, body: object | null, method = 'GET'): Promise<TestRequest> {
    const call = this.call(path, method);
    call.flush(body);
    await this.settle();
    return call;
  }

  async refuse(path: string, problem: Partial<ProblemDetails>, method = 'GET'): Promise<void> {
    const whole = {
      type: '/problems/x',
      title: 'It did not work',
      status: 422,
      code: 'request-invalid',
      requestId: 'r1',
      ...problem,
    };
    this.call(path, method).flush(whole, { status: whole.status, statusText: 'Refused' });
    await this.settle();
  }

  /** No call waits that the spec did not answer. */
  expectNoCall(path: string): void {
    this.http.expectNone((request) => request.url === path);
  }

  button(name: string): HTMLElement {
    return named(this.page, 'button', name);
  }

  link(name: string): HTMLElement {
    return named(this.page, 'a', name);
  }

  has(selector: string, name: string): boolean {
    return [...this.page.querySelectorAll<HTMLElement>(selector)].some((element) => wordsOf(element).startsWith(name));
  }

  async press(name: string): Promise<void> {
    this.button(name).click();
    await this.settle();
  }

  async type(label: string, text: string): Promise<void> {
    const control = controlOf<HTMLInputElement>(this.page, label);
    control.value = text;
    control.dispatchEvent(new Event('input'));
    await this.settle();
  }

  async choose(label: string, value: string): Promise<void> {
    const control = controlOf<HTMLSelectElement>(this.page, label);
    control.value = value;
    control.dispatchEvent(new Event('change'));
    await this.settle();
  }

  async tick(label: string): Promise<void> {
    controlOf<HTMLInputElement>(this.page, label).click();
    await this.settle();
  }

  valueOf(label: string): string {
    return controlOf<HTMLInputElement>(this.page, label).value;
  }

  /** The complaint that stands with a control. */
  complaintOf(label: string): string {
    const described = controlOf(this.page, label).getAttribute('aria-describedby') ?? '';
    const ids = described.split(' ').filter((id) => id.endsWith('-error'));
    return ids.map((id) => wordsOf(document.getElementById(id) as HTMLElement)).join(' ');
  }

  /** The words in a column of the only table, or of the one in the box of that name. */
  cells(column: number, table?: string): readonly string[] {
    const box = table === undefined ? this.page : named(this.page, 'tb-table-box', table);
    return [...box.querySelectorAll('tbody tr')].map((row) => wordsOf(row.children[column] as HTMLElement));
  }

  private call(path: string, method: string): TestRequest {
    return this.http.expectOne((request) => request.url === path && request.method === method, `${method} ${path}`);
  }
}
