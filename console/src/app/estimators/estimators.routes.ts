import { Routes } from '@angular/router';

export const estimatorsRoutes: Routes = [];
