import type { Route, Routes } from '@angular/router';
import { sessionGuard } from '../core/session/session-guard';
import { unsavedGuard } from '../ui/unsaved-guard';

/** The pages of one list: everybody who may come here reads it, an admin adds to it and changes it. */
const listRoutes = (
  title: string,
  loadComponent: Route['loadComponent'],
  loadForm: Route['loadComponent'],
): Routes => [
  { path: '', title, loadComponent },
  ...['new', ':id'].map((path) => ({
    path,
    title,
    canActivate: [sessionGuard('admin')],
    canDeactivate: [unsavedGuard],
    loadComponent: loadForm,
  })),
];

export const counterRoutes: Routes = listRoutes(
  'Counters',
  () => import('./counter-list/counter-list').then((m) => m.CounterList),
  () => import('./counter-form/counter-form').then((m) => m.CounterForm),
);
export const speciesRoutes: Routes = listRoutes(
  'Species',
  () => import('./species-list/species-list').then((m) => m.SpeciesList),
  () => import('./species-form/species-form').then((m) => m.SpeciesForm),
);
export const boxRoutes: Routes = listRoutes(
  'Boxes',
  () => import('./box-list/box-list').then((m) => m.BoxList),
  () => import('./box-form/box-form').then((m) => m.BoxForm),
);
