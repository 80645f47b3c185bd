import { Routes } from '@angular/router';

export const partnersRoutes: Routes = [];
