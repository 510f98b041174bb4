import type { Routes } from '@angular/router';

/** `/demo` */
export const routes: Routes = [
  { path: '', title: 'Demo', loadComponent: () => import('./demo-page/demo-page').then((m) => m.DemoPage) },
];
