import type { Routes } from '@angular/router';
import { sessionGuard } from '../core/session/session-guard';

export const routes: Routes = [
  { path: '', title: 'Runs', loadComponent: () => import('./runs-page').then((m) => m.RunsPage) },
  {
    path: 'new',
    title: 'New run',
    canActivate: [sessionGuard('coordinator', 'admin')],
    loadComponent: () => import('./new-run/new-run').then((m) => m.NewRun),
  },
  { path: ':id', title: 'Run', loadComponent: () => import('./run-page/run-page').then((m) => m.RunPage) },
];
