import { Routes } from '@angular/router';

export const partnerAreaRoutes: Routes = [];
