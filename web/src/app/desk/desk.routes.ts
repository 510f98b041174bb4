import type { Routes } from '@angular/router';

export const routes: Routes = [
  { path: '', title: 'Desk', loadComponent: () => import('./desk-page/desk-page').then((m) => m.DeskPage) },
];
