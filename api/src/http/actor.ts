import type { Role } from '@shared/contract';

/** Who asks: read fresh from the database at every request, so a changed role holds at once. */
export interface Actor {
  readonly id: number;
  readonly name: string;
  readonly email: string;
  readonly roles: readonly Role[];
  readonly zone: string;
}

export const has = (actor: Actor, ...roles: readonly Role[]): boolean =>
  roles.some((role) => actor.roles.includes(role));
