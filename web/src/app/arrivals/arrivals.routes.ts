import type { Routes } from '@angular/router';

/** By the buyer's link, signed in or not. */
export const routes: Routes = [
  {
    path: ':token',
    title: 'Your arrival',
    loadComponent: () => import('./arrival-page/arrival-page').then((m) => m.ArrivalPage),
  },
];

/** A signed-in buyer's own. */
export const myRoutes: Routes = [
  {
    path: '',
    title: 'My arrivals',
    loadComponent: () => import('./my-arrivals/my-arrivals').then((m) => m.MyArrivals),
  },
];
