import { inject } from '@angular/core';
import { Routes } from '@angular/router';
import { SessionStore } from '../api/session-store';

/** A partner's developer is led straight to the sheet of their own partner. */
export const partnerAreaRoutes: Routes = [
  {
    path: '',
    resolve: { id: () => inject(SessionStore).person()?.partnerId },
    loadComponent: () => import('./partner-page').then((m) => m.PartnerPage),
  },
];
