import type { Routes } from '@angular/router';
import { unsavedGuard } from '../ui/unsaved-guard';

const formPage = () => import('./parcel-form/parcel-form-page').then((m) => m.ParcelFormPage);

export const routes: Routes = [
  {
    path: '',
    title: 'Parcels',
    loadComponent: () => import('./parcel-list/parcel-list').then((m) => m.ParcelList),
  },
  { path: 'new', title: 'New parcel', canDeactivate: [unsavedGuard], loadComponent: formPage },
  { path: ':id/edit', title: 'Change a parcel', canDeactivate: [unsavedGuard], loadComponent: formPage },
  {
    path: ':id',
    title: 'Parcel',
    loadComponent: () => import('./parcel-page/parcel-page').then((m) => m.ParcelPage),
  },
];
