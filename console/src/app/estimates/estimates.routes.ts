import { Routes } from '@angular/router';

export const estimatesRoutes: Routes = [
  { path: ':id', title: 'Estimate', loadComponent: () => import('./estimate-page').then((m) => m.EstimatePage) },
];
