import type { Routes } from '@angular/router';

export const counterRoutes: Routes = [];
export const speciesRoutes: Routes = [];
export const boxRoutes: Routes = [];
