import type { Routes } from '@angular/router';
import { sessionGuard } from '../core/session/session-guard';
import { unsavedGuard } from '../ui/unsaved-guard';

const form = () => import('./blackout-form/blackout-form').then((m) => m.BlackoutForm);

export const routes: Routes = [
  {
    path: '',
    title: 'Calendar',
    loadComponent: () => import('./blackouts-page/blackouts-page').then((m) => m.BlackoutsPage),
  },
  {
    path: 'new',
    title: 'New blackout',
    canActivate: [sessionGuard('admin')],
    canDeactivate: [unsavedGuard],
    loadComponent: form,
  },
  {
    path: ':id',
    title: 'Blackout',
    canActivate: [sessionGuard('admin')],
    canDeactivate: [unsavedGuard],
    loadComponent: form,
  },
];
