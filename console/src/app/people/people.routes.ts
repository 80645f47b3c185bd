import { Routes } from '@angular/router';

export const peopleRoutes: Routes = [
  { path: '', title: 'People', loadComponent: () => import('./people-page').then((m) => m.PeoplePage) },
];
