import { Routes } from '@angular/router';

export const journalRoutes: Routes = [
  { path: '', title: 'Journal', loadComponent: () => import('./journal-page').then((m) => m.JournalPage) },
];
