import { Routes } from '@angular/router';

export const invitationRoutes: Routes = [];
