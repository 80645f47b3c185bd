import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter, withComponentInputBinding } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import { SignInPage } from './sign-in-page';

@Component({ template: 'arrived' })
class Arrived {}

const SESSION = {
  person: { id: 'person01', name: 'Ines Caldwell', email: 'ines@marlbay.example', roles: ['analyst'], partnerId: null },
  csrfToken: 'token',
  deskName: 'Marl Bay Yard Federation',
};

describe('SignInPage', () => {
  let http: HttpTestingController;
  let harness: RouterTestingHarness;
  let page: HTMLElement;

  async function open(address: string): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter(
          [
            { path: 'sign-in', component: SignInPage },
            { path: '**', component: Arrived },
          ],
          withComponentInputBinding(),
        ),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create(address);
    page = harness.routeNativeElement as HTMLElement;
  }

  async function type(name: string, text: string): Promise<void> {
    const control = page.querySelector<HTMLInputElement>(`input[name="${name}"]`) as HTMLInputElement;
    control.value = text;
    control.dispatchEvent(new Event('input'));
    await harness.fixture.whenStable();
  }

  async function submit(): Promise<void> {
    page.querySelector('form')?.dispatchEvent(new Event('submit', { cancelable: true }));
    await harness.fixture.whenStable();
  }

  async function signInAs(email: string, password: string): Promise<void> {
    await type('email', email);
    await type('password', password);
    await submit();
  }

  const button = (): HTMLButtonElement => page.querySelector('button[type="submit"]') as HTMLButtonElement;

  afterEach(() => {
    http.verify();
    jest.useRealTimers();
  });

  it('goes on to the address that was asked for', async () => {
    await open('/sign-in?return=%2Frecords%2Fabc12345');
    await signInAs(' ines@marlbay.example ', 'a long enough password');
    const call = http.expectOne({ method: 'POST', url: '/api/session' });
    expect(call.request.body).toEqual({ email: 'ines@marlbay.example', password: 'a long enough password' });
    call.flush(SESSION);
    await harness.fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe('/records/abc12345');
  });

  it.each(['https://elsewhere.example/', '//elsewhere.example', '/\\elsewhere.example'])(
    'never goes on to an address outside the desk (%s)',
    async (address) => {
      await open(`/sign-in?return=${encodeURIComponent(address)}`);
      await signInAs('ines@marlbay.example', 'a long enough password');
      http.expectOne('/api/session').flush(SESSION);
      await harness.fixture.whenStable();
      expect(TestBed.inject(Router).url).toBe('/');
    },
  );

  it('asks for what is missing beside the field and sends nothing', async () => {
    await open('/sign-in');
    await submit();
    const email = page.querySelector<HTMLInputElement>('input[name="email"]');
    expect(email?.getAttribute('aria-invalid')).toBe('true');
    expect(page.querySelector(`#${email?.getAttribute('aria-describedby')}`)?.textContent).toContain(
      'Enter your e-mail',
    );
    expect(document.activeElement).toBe(email);
  });

  it('says what to do when the desk refuses, and keeps what was typed', async () => {
    await open('/sign-in');
    await signInAs('ines@marlbay.example', 'wrong');
    const refusal = {
      code: 'sign-in-refused',
      title: 'Not signed in',
      detail: 'Check both and try again.',
      requestId: 'r1',
    };
    http.expectOne('/api/session').flush(refusal, { status: 401, statusText: 'Unauthorized' });
    await harness.fixture.whenStable();
    expect(page.querySelector('[role="alert"]')?.textContent).toContain('Check both and try again.');
    expect(page.querySelector<HTMLInputElement>('input[name="email"]')?.value).toBe('ines@marlbay.example');
  });

  it('holds the button back for as long as the desk asks for, then lets it go', async () => {
    await open('/sign-in');
    await signInAs('ines@marlbay.example', 'wrong');
    jest.useFakeTimers();
    const refusal = {
      code: 'sign-in-throttled',
      title: 'Too many attempts',
      detail: 'Wait.',
      requestId: 'r1',
      retryAfter: 2,
    };
    http.expectOne('/api/session').flush(refusal, { status: 429, statusText: 'Too Many Requests' });
    TestBed.tick();
    jest.advanceTimersByTime(0);
    TestBed.tick();
    expect(button().textContent).toContain('Wait 2 seconds');
    expect(button().getAttribute('aria-disabled')).toBe('true');
    jest.advanceTimersByTime(2000);
    TestBed.tick();
    expect(button().textContent).toContain('Sign in');
    expect(button().getAttribute('aria-disabled')).toBe('false');
  });

  it('tells a person whose session ended why they are here', async () => {
    await open('/sign-in?return=%2Fdesk&ended=true');
    expect(page.querySelector('[role="status"]')?.textContent).toContain('Your session has ended');
  });
});
