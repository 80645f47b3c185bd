import { Routes } from '@angular/router';
import { DeskPage } from './desk-page';

export const deskRoutes: Routes = [{ path: '', component: DeskPage }];
