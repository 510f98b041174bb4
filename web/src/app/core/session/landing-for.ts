import type { Role } from '@shared/contract';

/** Where each role's work begins; for several roles the first of this order decides. */
const landings: readonly (readonly [Role, string])[] = [
  ['admin', '/desk'],
  ['coordinator', '/runs'],
  ['breeder', '/parcels'],
  ['buyer', '/my-arrivals'],
];

/** The first page after signing in, by role; nobody signed in (or without a role) goes to the sign-in. */
export function landingFor(roles: readonly Role[]): string {
  return landings.find(([role]) => roles.includes(role))?.[1] ?? '/sign-in';
}

/**
 * Whether somebody with these roles (null: not signed in) may open a page that `allowed` may see (empty: everyone
 * signed in). Answers true, or the address to go to instead; `url` comes back after signing in.
 */
export function gateFor(roles: readonly Role[] | null, allowed: readonly Role[], url: string): true | string {
  if (roles === null) return url === '/' ? '/sign-in' : `/sign-in?from=${encodeURIComponent(url)}`;
  if (allowed.length === 0 || allowed.some((role) => roles.includes(role))) return true;
  return landingFor(roles);
}

/** A page of this site to return to, or null: an address of another site must never come in by the query. */
export function safeReturn(from: string | null | undefined): string | null {
  return from && /^\/(?![/\\])/.test(from) && !from.startsWith('/sign-in') ? from : null;
}
