import { Routes } from '@angular/router';

export const invitationRoutes: Routes = [
  { path: ':token', loadComponent: () => import('./invitation-page').then((m) => m.InvitationPage) },
];
