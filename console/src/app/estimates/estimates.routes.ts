import { Routes } from '@angular/router';

export const estimatesRoutes: Routes = [];
