import type { Routes } from '@angular/router';

export const routes: Routes = [
  {
    path: '',
    title: 'Route check',
    loadComponent: () => import('./route-check-page/route-check-page').then((m) => m.RouteCheckPage),
  },
];
