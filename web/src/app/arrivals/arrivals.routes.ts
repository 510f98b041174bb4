import type { Routes } from '@angular/router';

export const routes: Routes = [];
export const myRoutes: Routes = [];
