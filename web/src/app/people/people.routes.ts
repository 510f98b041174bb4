import type { Routes } from '@angular/router';
import { unsavedGuard } from '../ui/unsaved-guard';

const form = () => import('./person-form/person-form').then((m) => m.PersonForm);

export const routes: Routes = [
  {
    path: '',
    title: 'People',
    loadComponent: () => import('./people-list/people-list').then((m) => m.PeopleList),
  },
  { path: 'new', title: 'Invite somebody', canDeactivate: [unsavedGuard], loadComponent: form },
  { path: ':id', title: 'Person', canDeactivate: [unsavedGuard], loadComponent: form },
];
