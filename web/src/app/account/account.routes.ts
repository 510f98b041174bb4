import type { Routes } from '@angular/router';
import { unsavedGuard } from '../ui/unsaved-guard';

export const routes: Routes = [
  {
    path: '',
    title: 'Your account',
    canDeactivate: [unsavedGuard],
    loadComponent: () => import('./account-page/account-page').then((m) => m.AccountPage),
  },
];
