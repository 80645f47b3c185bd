import { Routes } from '@angular/router';

export const deskRoutes: Routes = [];
