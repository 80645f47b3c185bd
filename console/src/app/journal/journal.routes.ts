import { Routes } from '@angular/router';

export const journalRoutes: Routes = [];
