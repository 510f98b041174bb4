import { inject } from '@angular/core';
import { Router, type CanActivateFn } from '@angular/router';
import type { Role } from '@shared/contract';
import { gateFor, landingFor } from './landing-for';
import { SessionStore } from './session-store';

/** Lets in who is signed in and holds one of the roles (none given: everyone signed in). */
export const sessionGuard =
  (...allowed: readonly Role[]): CanActivateFn =>
  async (_route, state) => {
    const router = inject(Router);
    const session = inject(SessionStore);
    const { me } = await session.ready();
    const answer = gateFor(me?.roles ?? null, allowed, state.url);
    return answer === true ? true : router.parseUrl(answer);
  };

/** The bare address: to the first page of whoever is signed in. */
export const landingGuard: CanActivateFn = async () => {
  const router = inject(Router);
  const { me } = await inject(SessionStore).ready();
  return router.parseUrl(landingFor(me?.roles ?? []));
};
