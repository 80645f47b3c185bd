import { HttpClient, provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Role, Session } from './contract';
import { signedIn, withRole } from './session-guard';
import { SessionStore } from './session-store';
import { signInRedirect } from './sign-in-redirect';

@Component({ template: 'page' })
class Page {}

function sessionOf(...roles: Role[]): Session {
  const person = { id: 'person01', name: 'Ines Caldwell', email: 'ines@marlbay.example', roles, partnerId: null };
  return { person, csrfToken: 'token', deskName: 'Marl Bay Yard Federation' };
}

const taskTurn = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

describe('the session', () => {
  let http: HttpTestingController;
  let harness: RouterTestingHarness;

  beforeEach(async () => {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(withInterceptors([signInRedirect])),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'sign-in', component: Page },
          { path: 'unreachable', component: Page },
          { path: 'not-permitted', component: Page },
          {
            path: '',
            canActivate: [signedIn],
            children: [
              { path: 'records', component: Page },
              { path: 'people', component: Page, canActivate: [withRole('administrator')] },
            ],
          },
        ]),
      ],
    });
    http = TestBed.inject(HttpTestingController);
    harness = await RouterTestingHarness.create();
  });

  afterEach(() => http.verify());

  async function goTo(
    url: string,
    answer: (call: ReturnType<HttpTestingController['expectOne']>) => void,
  ): Promise<void> {
    const arrival = harness.navigateByUrl(url);
    await taskTurn(); // The router reaches its guards after a few microtasks.
    answer(http.expectOne('/api/session'));
    await arrival;
  }

  const refuse = (call: ReturnType<HttpTestingController['expectOne']>): void =>
    call.flush({ code: 'sign-in-required', title: 'Sign in' }, { status: 401, statusText: 'Unauthorized' });

  it('sends a stranger to sign in and keeps the address they asked for', async () => {
    await goTo('/records?sort=name', refuse);
    expect(TestBed.inject(Router).url).toBe('/sign-in?return=%2Frecords%3Fsort%3Dname');
  });

  it('lets a signed-in person in and asks only once', async () => {
    await goTo('/records', (call) => call.flush(sessionOf('viewer')));
    await harness.navigateByUrl('/people');
    expect(TestBed.inject(SessionStore).deskName()).toBe('Marl Bay Yard Federation');
  });

  it('keeps people out of a section that their roles do not include', async () => {
    await goTo('/people', (call) => call.flush(sessionOf('analyst', 'reviewer')));
    expect(TestBed.inject(Router).url).toBe('/not-permitted');
    expect(TestBed.inject(SessionStore).holds('administrator')).toBe(false);
  });

  it('says so when the service does not answer, instead of asking for a password', async () => {
    await goTo('/records', (call) => call.error(new ProgressEvent('error')));
    expect(TestBed.inject(Router).routerState.snapshot.root.firstChild?.routeConfig?.path).toBe('unreachable');
  });

  it('goes to sign in, with the way back, when the session ends under way', async () => {
    await goTo('/records', (call) => call.flush(sessionOf('viewer')));
    const failed = jest.fn();
    TestBed.inject(HttpClient).get('/api/record-sets').subscribe({ error: failed });
    refuse(http.expectOne('/api/record-sets'));
    await harness.fixture.whenStable();
    expect(failed).toHaveBeenCalled();
    expect(TestBed.inject(Router).url).toBe('/sign-in?return=%2Frecords&ended=true');
    expect(TestBed.inject(SessionStore).person()).toBeUndefined();
  });

  it('leaves a refused sign-in to the sign-in screen', () => {
    const before = TestBed.inject(Router).url;
    TestBed.inject(SessionStore)
      .signIn({ email: 'ines@marlbay.example', password: 'wrong' })
      .subscribe({ error: jest.fn() });
    http.expectOne('/api/session').flush({ code: 'sign-in-refused' }, { status: 401, statusText: 'Unauthorized' });
    expect(TestBed.inject(Router).url).toBe(before);
  });
});
