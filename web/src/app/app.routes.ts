import type { Routes } from '@angular/router';
import { landingGuard, sessionGuard } from './core/session/session-guard';

const counters = () => import('./places/places.routes').then((m) => m.counterRoutes);
const species = () => import('./places/places.routes').then((m) => m.speciesRoutes);
const boxes = () => import('./places/places.routes').then((m) => m.boxRoutes);
const sessionPage = () => import('./session/session.routes');

export const routes: Routes = [
  { path: '', pathMatch: 'full', canActivate: [landingGuard], children: [] },
  { path: 'sign-in', loadChildren: () => sessionPage().then((m) => m.signInRoutes) },
  { path: 'forgot-password', loadChildren: () => sessionPage().then((m) => m.forgotRoutes) },
  { path: 'account-link', loadChildren: () => sessionPage().then((m) => m.linkRoutes) },
  { path: 'demo', loadChildren: () => import('./demo/demo.routes').then((m) => m.routes) },
  { path: 'arrival', loadChildren: () => import('./arrivals/arrivals.routes').then((m) => m.routes) },
  {
    path: '',
    canActivate: [sessionGuard()],
    loadComponent: () => import('./layout/shell/shell').then((m) => m.Shell),
    children: [
      {
        path: 'parcels',
        canActivate: [sessionGuard('breeder', 'coordinator', 'admin')],
        loadChildren: () => import('./parcels/parcels.routes').then((m) => m.routes),
      },
      {
        path: 'route-check',
        canActivate: [sessionGuard('breeder', 'coordinator', 'admin')],
        loadChildren: () => import('./route-check/route-check.routes').then((m) => m.routes),
      },
      {
        path: 'runs',
        canActivate: [sessionGuard('coordinator', 'admin', 'breeder')],
        loadChildren: () => import('./runs/runs.routes').then((m) => m.routes),
      },
      {
        path: 'my-arrivals',
        loadChildren: () => import('./arrivals/arrivals.routes').then((m) => m.myRoutes),
      },
      { path: 'blackouts', loadChildren: () => import('./blackouts/blackouts.routes').then((m) => m.routes) },
      {
        path: 'desk',
        canActivate: [sessionGuard('admin')],
        loadChildren: () => import('./desk/desk.routes').then((m) => m.routes),
      },
      { path: 'counters', canActivate: [sessionGuard('admin', 'coordinator')], loadChildren: counters },
      { path: 'species', canActivate: [sessionGuard('admin', 'coordinator')], loadChildren: species },
      { path: 'boxes', canActivate: [sessionGuard('admin', 'coordinator')], loadChildren: boxes },
      {
        path: 'people',
        canActivate: [sessionGuard('admin')],
        loadChildren: () => import('./people/people.routes').then((m) => m.routes),
      },
      {
        path: 'policy',
        canActivate: [sessionGuard('admin', 'coordinator', 'breeder')],
        loadChildren: () => import('./policy/policy.routes').then((m) => m.routes),
      },
      { path: 'how', loadChildren: () => import('./how/how.routes').then((m) => m.routes) },
      { path: 'account', loadChildren: () => import('./account/account.routes').then((m) => m.routes) },
    ],
  },
  {
    path: '**',
    title: 'Not found',
    loadComponent: () => import('./layout/not-found/not-found').then((m) => m.NotFound),
  },
];
