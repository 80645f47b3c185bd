import { Routes } from '@angular/router';

export const settingsRoutes: Routes = [];
