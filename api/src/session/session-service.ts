import argon2 from 'argon2';
import { AppError } from '@shared/errors';
import type { SessionInfo, Me } from '@shared/contract';
import type { Deps } from '../deps';
import { sendLink } from './account-links';
import { findAccount, type Account } from './session-queries';

export interface SessionService {
  /** The account that e-mail and password open; throws `wrong-credentials`, the same for every cause. */
  check(email: string, password: string): Promise<Account>;
  info(personId: number | null): Promise<SessionInfo>;
  /** Makes a one-time link for a person and puts it into the outbox; older links of the kind end. */
  sendLink(personId: number, kind: 'invitation' | 'reset'): Promise<void>;
}

/** OWASP Password Storage Cheat Sheet: argon2id with 19 MiB, 2 passes, 1 lane at least. */
export const hashOptions = { type: argon2.argon2id, memoryCost: 19456, timeCost: 2, parallelism: 1 } as const;

/** Verified when the account does not exist, so that both cases take the same time. */
const nobodysHash = argon2.hash('nobody has this password', hashOptions);

interface MeRow {
  id: number;
  name: string;
  email: string;
  business_name: string | null;
  zone: string;
  temperature_unit: 'F' | 'C';
}

/** Signing in and what the pages know of the person who is. */
export function createSessionService(deps: Deps): SessionService {
  const { db, config } = deps;
  return {
    async check(email, password) {
      const account = await findAccount(db, { email: email.toLowerCase() });
      const right = await argon2.verify(account?.passwordHash ?? (await nobodysHash), password);
      if (!right || !account?.passwordHash || !account.active)
        throw new AppError('wrong-credentials', 'Check both and try again, or ask for a new password.');
      return account;
    },
    sendLink: (personId, kind) => sendLink(deps, personId, kind),
    async info(personId) {
      const { policy } = await deps.services.policy.current();
      const circle = { demo: config.DEMO, circleName: policy.circleName, circleZone: policy.circleZone };
      return { me: personId === null ? null : await meOf(personId), ...circle };
    },
  };

  async function meOf(personId: number): Promise<Me | null> {
    const account = await findAccount(db, { id: personId });
    const row = await db<MeRow>('people').where({ id: personId }).first();
    if (!row || !account) return null;
    return {
      id: row.id,
      name: row.name,
      email: row.email,
      roles: [...account.roles],
      businessName: row.business_name,
      zone: row.zone,
      temperatureUnit: row.temperature_unit,
    };
  }
}
