import type { Routes } from '@angular/router';

/** `/sign-in` */
export const signInRoutes: Routes = [
  { path: '', title: 'Sign in', loadComponent: () => import('./sign-in/sign-in').then((m) => m.SignInPage) },
];

/** `/forgot-password` */
export const forgotRoutes: Routes = [
  {
    path: '',
    title: 'New password',
    loadComponent: () => import('./forgot-password/forgot-password').then((m) => m.ForgotPassword),
  },
];

/** `/account-link/:token`, as it stands in invitations and reset mails */
export const linkRoutes: Routes = [
  {
    path: ':token',
    title: 'Set your password',
    loadComponent: () => import('./account-link/account-link').then((m) => m.AccountLinkPage),
  },
];
