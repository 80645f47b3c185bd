import { Routes } from '@angular/router';

export const recordsRoutes: Routes = [];
