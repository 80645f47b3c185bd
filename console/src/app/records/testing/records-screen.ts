import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, TestRequest, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Role } from '../../api/contract';
import { SessionStore } from '../../api/session-store';
import { recordsRoutes } from '../records.routes';

@Component({ template: 'elsewhere' })
class Elsewhere {}

/** The records section, opened at an address by someone with the roles, against answers that a spec gives. */
export class RecordsScreen {
  private constructor(
    private readonly harness: RouterTestingHarness,
    readonly http: HttpTestingController,
  ) {}

  static async open(address: string, ...roles: Role[]): Promise<RecordsScreen> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'records', children: recordsRoutes },
            { path: '**', component: Elsewhere },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    const http = TestBed.inject(HttpTestingController);
    TestBed.inject(SessionStore).ensure().subscribe();
    const person = { id: 'person01', name: 'Ines Caldwell', email: 'ines@marlbay.example', roles, partnerId: null };
    http.expectOne('/api/session').flush({ person, csrfToken: 'token', deskName: 'Marl Bay Yard Federation' });
    const harness = await RouterTestingHarness.create(address);
    await harness.fixture.whenStable();
    return new RecordsScreen(harness, http);
  }

  get page(): HTMLElement {
    return this.harness.routeNativeElement as HTMLElement;
  }

  get text(): string {
    return (this.page.textContent ?? '').replace(/\s+/g, ' ');
  }

  get address(): string {
    return TestBed.inject(Router).url;
  }

  stable(): Promise<unknown> {
    return this.harness.fixture.whenStable();
  }

  call(path: string): TestRequest {
    return this.http.expectOne((request) => request.url === path);
  }

  async answer(path: string, body: object): Promise<TestRequest> {
    const call = this.call(path);
    call.flush(body);
    await this.stable();
    return call;
  }

  async refuse(path: string, status: number, problem: object): Promise<void> {
    this.call(path).flush({ title: 'Refused', requestId: 'r1', ...problem }, { status, statusText: 'Refused' });
    await this.stable();
  }

  button(name: string): HTMLButtonElement {
    const found = [...this.page.querySelectorAll('button')].find((button) =>
      button.textContent?.trim().startsWith(name),
    );
    if (!found) throw new Error(`There is no button “${name}” among: ${this.text}`);
    return found;
  }

  async press(name: string): Promise<void> {
    this.button(name).click();
    await this.stable();
  }

  async type(label: string, text: string): Promise<void> {
    const control = this.control(label);
    control.value = text;
    control.dispatchEvent(new Event('input'));
    await this.stable();
  }

  control(label: string): HTMLInputElement {
    const found = [...this.page.querySelectorAll('label')].find((each) => each.textContent?.trim().startsWith(label));
    return this.page.querySelector(`#${found?.htmlFor}`) as HTMLInputElement;
  }

  async drop(file: File): Promise<void> {
    const event = Object.assign(new Event('drop', { cancelable: true }), { dataTransfer: { files: [file] } });
    this.page.querySelector('.zone')?.dispatchEvent(event);
    await this.stable();
  }

  async submit(): Promise<void> {
    this.page.querySelector('form')?.dispatchEvent(new Event('submit', { cancelable: true }));
    await this.stable();
  }

  column(index: number): (string | undefined)[] {
    return [...this.page.querySelectorAll('tbody tr')].map((row) => row.children[index]?.textContent?.trim());
  }
}
