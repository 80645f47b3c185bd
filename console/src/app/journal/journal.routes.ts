import { Routes } from '@angular/router';
import { leadToEdition, leadToFit } from './lead-to-subject';

export const journalRoutes: Routes = [
  { path: '', title: 'Journal', loadComponent: () => import('./journal-page').then((m) => m.JournalPage) },
  { path: 'edition/:id', canActivate: [leadToEdition], children: [] },
  { path: 'fit/:id', canActivate: [leadToFit], children: [] },
];
