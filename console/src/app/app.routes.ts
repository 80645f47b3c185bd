import { inject } from '@angular/core';
import { Route, Router, Routes } from '@angular/router';
import { DESK_ROLES } from './api/roles';
import { signedIn, withRole } from './api/session-guard';
import { SessionStore } from './api/session-store';
import { SECTIONS, Section } from './shell/sections';

function section({ label, path, roles }: Section, loadChildren: Route['loadChildren']): Route {
  return { path, title: label, canActivate: [withRole(...roles)], loadChildren };
}

export const routes: Routes = [
  {
    path: 'sign-in',
    title: 'Sign in',
    loadComponent: () => import('./sign-in/sign-in-page').then((m) => m.SignInPage),
  },
  {
    path: 'invitations',
    title: 'Set your password',
    loadChildren: () => import('./invitation/invitation.routes').then((m) => m.invitationRoutes),
  },
  {
    path: 'unreachable',
    title: 'No answer from the desk',
    loadComponent: () => import('./shell/unreachable-page').then((m) => m.UnreachablePage),
  },
  {
    path: '',
    canActivate: [signedIn],
    loadComponent: () => import('./shell/shell').then((m) => m.Shell),
    children: [
      { path: '', pathMatch: 'full', redirectTo: () => firstSection() },
      section(SECTIONS.desk, () => import('./desk/desk.routes').then((m) => m.deskRoutes)),
      section(SECTIONS.records, () => import('./records/records.routes').then((m) => m.recordsRoutes)),
      section(SECTIONS.estimators, () => import('./estimators/estimators.routes').then((m) => m.estimatorsRoutes)),
      section(SECTIONS.partners, () => import('./partners/partners.routes').then((m) => m.partnersRoutes)),
      section(SECTIONS.people, () => import('./people/people.routes').then((m) => m.peopleRoutes)),
      section(SECTIONS.journal, () => import('./journal/journal.routes').then((m) => m.journalRoutes)),
      section(SECTIONS.settings, () => import('./settings/settings.routes').then((m) => m.settingsRoutes)),
      section(SECTIONS.partnerArea, () => import('./partners/partner-area.routes').then((m) => m.partnerAreaRoutes)),
      section({ label: 'Estimate', path: 'estimates', roles: DESK_ROLES }, () =>
        import('./estimates/estimates.routes').then((m) => m.estimatesRoutes),
      ),
      {
        path: 'not-permitted',
        title: 'Not open to you',
        loadComponent: () => import('./shell/not-permitted-page').then((m) => m.NotPermittedPage),
      },
      {
        path: '**',
        title: 'No such page',
        loadComponent: () => import('./shell/not-found-page').then((m) => m.NotFoundPage),
      },
    ],
  },
];

function firstSection(): ReturnType<Router['parseUrl']> {
  const first = inject(SessionStore).holds(...SECTIONS.desk.roles) ? SECTIONS.desk : SECTIONS.partnerArea;
  return inject(Router).parseUrl(`/${first.path}`);
}
