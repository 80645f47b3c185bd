import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Router, TitleStrategy, provideRouter } from '@angular/router';
import { RouterTestingHarness } from '@angular/router/testing';
import type { Role } from '../api/contract';
import { SessionStore } from '../api/session-store';
import { Announcer } from '../ui/announcer';
import { DeskTitle } from './desk-title';
import { Shell } from './shell';

@Component({ template: '<h1>Page</h1>' })
class Page {}

describe('Shell', () => {
  let http: HttpTestingController;
  let harness: RouterTestingHarness;
  let shell: HTMLElement;

  async function open(...roles: Role[]): Promise<void> {
    TestBed.configureTestingModule({
      providers: [
        provideHttpClient(),
        provideHttpClientTesting(),
        provideRouter([
          { path: 'sign-in', component: Page, title: 'Sign in' },
          { path: '', component: Shell, children: [{ path: '**', component: Page, title: 'Records' }] },
        ]),
        { provide: TitleStrategy, useExisting: DeskTitle },
      ],
    });
    http = TestBed.inject(HttpTestingController);
    TestBed.inject(SessionStore).ensure().subscribe();
    const person = { id: 'person01', name: 'Ines Caldwell', email: 'ines@marlbay.example', roles, partnerId: null };
    http.expectOne('/api/session').flush({ person, csrfToken: 'token', deskName: 'Marl Bay Yard Federation' });
    harness = await RouterTestingHarness.create('/records');
    shell = harness.routeNativeElement as HTMLElement;
  }

  const sections = (): (string | undefined)[] =>
    [...shell.querySelectorAll('nav a')].map((link) => link.textContent?.trim());
  const button = (name: string): HTMLButtonElement =>
    [...shell.querySelectorAll('button')].find((each) => each.textContent?.includes(name)) as HTMLButtonElement;

  async function press(name: string): Promise<void> {
    button(name).click();
    await harness.fixture.whenStable();
  }

  afterEach(() => http.verify());

  it.each([
    [['viewer'], ['Desk', 'Records', 'Estimators', 'Partners', 'Settings']],
    [['administrator'], ['Desk', 'Records', 'Estimators', 'Partners', 'People', 'Journal', 'Settings']],
    [['partner-developer'], ['Partner area']],
  ] as [Role[], string[]][])('shows %s only the sections they may use', async (roles, expected) => {
    await open(...roles);
    expect(sections()).toEqual(expected);
  });

  it('marks the section that is open, for eyes and ears', async () => {
    await open('viewer');
    expect(shell.querySelector('nav a[aria-current="page"]')?.textContent?.trim()).toBe('Records');
  });

  it('puts the page before the desk in the title bar', async () => {
    await open('viewer');
    expect(document.title).toBe('Records · Marl Bay Yard Federation');
  });

  it('closes the person menu with Escape and gives the focus back', async () => {
    await open('viewer');
    await press('Ines Caldwell');
    expect(shell.querySelector('#person-panel')).not.toBeNull();
    shell.querySelector('header')?.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }));
    await harness.fixture.whenStable();
    expect(shell.querySelector('#person-panel')).toBeNull();
    expect(document.activeElement).toBe(button('Ines Caldwell'));
  });

  it('leads from the reference of an estimate to the estimate', async () => {
    await open('viewer');
    await press('Search');
    const reference = shell.querySelector<HTMLInputElement>('#search-panel input') as HTMLInputElement;
    expect(document.activeElement).toBe(reference);
    reference.value = ' 4K2M 9X7Q 1B ';
    reference.dispatchEvent(new Event('input'));
    await press('Find');
    expect(TestBed.inject(Router).url).toBe('/estimates/4k2m9x7q1b');
  });

  it('has nothing to search for a partner developer', async () => {
    await open('partner-developer');
    expect(button('Search')).toBeUndefined();
  });

  it('signs out and leaves nothing behind', async () => {
    await open('viewer');
    await press('Ines Caldwell');
    await press('Sign out');
    http.expectOne({ method: 'DELETE', url: '/api/session' }).flush(null, { status: 204, statusText: 'No Content' });
    await harness.fixture.whenStable();
    expect(TestBed.inject(Router).url).toBe('/sign-in');
    expect(TestBed.inject(SessionStore).person()).toBeUndefined();
  });

  it('says that the person is still signed in when signing out fails', async () => {
    await open('viewer');
    await press('Ines Caldwell');
    await press('Sign out');
    http.expectOne('/api/session').error(new ProgressEvent('error'));
    await harness.fixture.whenStable();
    expect(shell.querySelector('[role="status"]')?.textContent).toContain('You are still signed in');
  });

  it('moves the focus past the top band with the skip link', async () => {
    await open('viewer');
    shell.querySelector<HTMLElement>('a.skip')?.click();
    expect(document.activeElement?.id).toBe('main');
  });

  it('says the same result aloud twice when it happens twice', async () => {
    await open('viewer');
    const announcer = TestBed.inject(Announcer);
    announcer.say('Saved');
    const first = announcer.text();
    announcer.say('Saved');
    expect(announcer.text()).not.toBe(first);
  });
});
