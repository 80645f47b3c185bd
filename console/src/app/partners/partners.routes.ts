import { Routes } from '@angular/router';

export const partnersRoutes: Routes = [
  { path: '', title: 'Partners', loadComponent: () => import('./partners-page').then((m) => m.PartnersPage) },
  { path: ':id', title: 'Partner', loadComponent: () => import('./partner-page').then((m) => m.PartnerPage) },
];
