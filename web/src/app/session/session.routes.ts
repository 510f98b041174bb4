import type { Routes } from '@angular/router';

export const signInRoutes: Routes = [];
export const forgotRoutes: Routes = [];
export const linkRoutes: Routes = [];
