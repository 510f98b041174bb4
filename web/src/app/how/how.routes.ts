import type { Routes } from '@angular/router';

export const routes: Routes = [
  {
    path: '',
    title: 'How this is worked out',
    loadComponent: () => import('./how-page/how-page').then((m) => m.HowPage),
  },
];
