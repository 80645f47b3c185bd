import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, TestRequest, provideHttpClientTesting } from '@angular/common/http/testing';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import type { DeskOverview, EditionSummary, Role } from '../api/contract';
import { SessionStore } from '../api/session-store';
import { DeskPage } from './desk-page';

const INES = { id: 'person01', name: 'Ines Caldwell' };
const MORAG = { id: 'person02', name: 'Morag Tulloch' };

const EDITION: EditionSummary = {
  id: 'edition4',
  number: 4,
  estimator: 'refit-labour',
  estimatorName: 'Refit labour',
  unit: 'h',
  state: 'in-force',
  changeNote: 'Adds the winter of 2025',
  fitId: 'fit00004',
  method: 'ridge',
  rmse: 38.214,
  recordCount: 2391,
  inputCount: 11,
  createdAt: '2026-10-28T09:00:00Z',
  createdBy: INES,
  submittedAt: '2026-10-29T09:00:00Z',
  submittedBy: INES,
  inForceAt: '2026-11-03T12:00:00Z',
  inForceBy: MORAG,
  endedAt: null,
};

const EMPTY_DESK: DeskOverview = {
  deskName: 'Marl Bay Yard Federation',
  underReview: [],
  inForce: [],
  fitsUnderWay: [],
  estimatesToday: 0,
  estimatesLast30Days: 0,
  recent: [],
};

const BUSY_DESK: DeskOverview = {
  ...EMPTY_DESK,
  inForce: [EDITION],
  underReview: [{ ...EDITION, id: 'edition5', number: 5, state: 'under-review', inForceAt: null, inForceBy: null }],
  fitsUnderWay: [
    {
      id: 'fit00009',
      estimator: 'crane-time',
      estimatorName: 'Crane time',
      state: 'running',
      progress: { stage: 'Cross-validation', done: 4, total: 10 },
    },
  ],
  estimatesToday: 41,
  estimatesLast30Days: 1873,
  recent: [
    {
      id: 7,
      at: '2026-11-03T12:00:00Z',
      actor: null,
      action: 'edition.superseded',
      subjectKind: 'edition',
      subjectId: 'edition3',
      summary: 'Edition 3 of Refit labour was superseded',
    },
  ],
};

describe('DeskPage', () => {
  let http: HttpTestingController;
  let fixture: ComponentFixture<DeskPage>;
  const text = (): string => (fixture.nativeElement as HTMLElement).textContent ?? '';

  async function open(...roles: Role[]): Promise<TestRequest> {
    TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting(), provideRouter([])] });
    http = TestBed.inject(HttpTestingController);
    TestBed.inject(SessionStore).ensure().subscribe();
    const person = { ...INES, email: 'ines@marlbay.example', roles, partnerId: null };
    http.expectOne('/api/session').flush({ person, csrfToken: 'token', deskName: 'Marl Bay Yard Federation' });
    fixture = TestBed.createComponent(DeskPage);
    await fixture.whenStable();
    return http.expectOne('/api/desk');
  }

  afterEach(() => {
    fixture.destroy();
    http.verify();
  });

  it('says what it is reading while it waits', async () => {
    await open('viewer');
    expect(text()).toContain('Reading what is in force and what waits');
  });

  it('shows what waits for review, what is in force and what is under way', async () => {
    (await open('viewer')).flush(BUSY_DESK);
    await fixture.whenStable();
    const page = fixture.nativeElement as HTMLElement;
    const links = [...page.querySelectorAll('a')].map((link) => link.getAttribute('href'));
    expect(links).toEqual(
      expect.arrayContaining([
        '/estimators/refit-labour/editions/edition5',
        '/estimators/refit-labour',
        '/estimators/crane-time/fits/fit00009',
      ]),
    );
    expect(text()).toContain('1,873');
    expect(text()).toContain('Cross-validation, 4 of 10 steps');
    expect(text()).toContain('Edition 3 of Refit labour was superseded');
  });

  it('gives the held-out error with its unit and no digits that it has not earned', async () => {
    (await open('viewer')).flush(BUSY_DESK);
    await fixture.whenStable();
    const figures = [...(fixture.nativeElement as HTMLElement).querySelectorAll('.tb-figure')];
    expect(figures.map((figure) => figure.textContent?.trim())).toContain('38\u00a0h');
  });

  it('looks again while a fit is under way, and leaves off when none is', async () => {
    const first = await open('viewer');
    jest.useFakeTimers();
    first.flush(BUSY_DESK);
    TestBed.tick();
    jest.advanceTimersByTime(5000);
    TestBed.tick();
    http.expectOne('/api/desk').flush({ ...BUSY_DESK, fitsUnderWay: [] });
    TestBed.tick();
    jest.advanceTimersByTime(60_000);
    TestBed.tick();
    http.expectNone('/api/desk');
    jest.useRealTimers();
  });

  it('offers an analyst of an empty desk the first step', async () => {
    (await open('analyst')).flush(EMPTY_DESK);
    await fixture.whenStable();
    expect(text()).toContain('Nothing is in force yet');
    expect((fixture.nativeElement as HTMLElement).querySelector('a[href="/records/bring-in"]')).not.toBeNull();
  });

  it('does not offer a viewer what they may not do', async () => {
    (await open('viewer')).flush(EMPTY_DESK);
    await fixture.whenStable();
    expect((fixture.nativeElement as HTMLElement).querySelector('a[href="/records/bring-in"]')).toBeNull();
  });

  it('says what went wrong and reads again when asked', async () => {
    (await open('viewer')).flush(
      { code: 'unavailable', title: 'The desk is busy', detail: 'Wait.', requestId: 'r1' },
      { status: 503, statusText: 'Unavailable' },
    );
    await fixture.whenStable();
    expect((fixture.nativeElement as HTMLElement).querySelector('[role="alert"]')?.textContent).toContain(
      'The desk is busy',
    );
    (fixture.nativeElement as HTMLElement).querySelector('button')?.click();
    await fixture.whenStable();
    http.expectOne('/api/desk').flush(BUSY_DESK);
    await fixture.whenStable();
    expect(text()).toContain('Refit labour');
  });
});
