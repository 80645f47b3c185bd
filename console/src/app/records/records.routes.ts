import { Routes } from '@angular/router';
import { withRole } from '../api/session-guard';

export const recordsRoutes: Routes = [
  { path: '', loadComponent: () => import('./records-page').then((m) => m.RecordsPage) },
  {
    path: 'bring-in',
    title: 'Bring in records',
    canActivate: [withRole('analyst')],
    loadComponent: () => import('./bring-in/bring-in-page').then((m) => m.BringInPage),
  },
  {
    path: 'bring-in/:incomingId',
    title: 'How the file would be read',
    canActivate: [withRole('analyst')],
    loadComponent: () => import('./bring-in/proposal-page').then((m) => m.ProposalPage),
  },
  {
    path: 'revisions/:id/mend',
    title: 'Mending',
    canActivate: [withRole('analyst')],
    loadComponent: () => import('./mending/mending-page').then((m) => m.MendingPage),
  },
  {
    path: 'revisions/:id/compare',
    title: 'Compare revisions',
    loadComponent: () => import('./comparison/comparison-page').then((m) => m.ComparisonPage),
  },
  {
    path: 'revisions/:id',
    title: 'Revision',
    loadComponent: () => import('./revision/revision-page').then((m) => m.RevisionPage),
  },
  { path: ':id', title: 'Record set', loadComponent: () => import('./record-set-page').then((m) => m.RecordSetPage) },
];
