import type { Routes } from '@angular/router';
import { unsavedGuard } from '../ui/unsaved-guard';

export const routes: Routes = [
  {
    path: '',
    title: 'Policy',
    canDeactivate: [unsavedGuard],
    loadComponent: () => import('./policy-page/policy-page').then((m) => m.PolicyPage),
  },
];
