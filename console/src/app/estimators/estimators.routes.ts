import { Routes } from '@angular/router';
import { withRole } from '../api/session-guard';

export const estimatorsRoutes: Routes = [
  { path: '', loadComponent: () => import('./list/estimators-page').then((m) => m.EstimatorsPage) },
  {
    path: ':slug',
    title: 'Estimator',
    loadComponent: () => import('./sheet/estimator-page').then((m) => m.EstimatorPage),
  },
  {
    path: ':slug/new-fit',
    title: 'New fit',
    canActivate: [withRole('analyst')],
    loadComponent: () => import('./new-fit/new-fit-page').then((m) => m.NewFitPage),
  },
  { path: ':slug/fits/:id', title: 'Fit', loadComponent: () => import('./fit/fit-page').then((m) => m.FitPage) },
  {
    path: ':slug/editions/:id',
    title: 'Edition',
    loadComponent: () => import('./edition/edition-page').then((m) => m.EditionPage),
  },
];
