import type { AccountLink, DemoInfo, Me, SessionInfo } from '@shared/contract';
import { AppError, badInput, notFound } from '@shared/errors';
import type { Deps } from '../deps';
import * as links from './account-links';
import { demoInfo } from './demo-info';
import { hashPassword, verifyPassword } from './password-hash';
import { checkNewPassword } from './password-rules';
import { findAccount, setPassword, type Account } from './session-queries';
import { countTry, forgetFailures } from './sign-in-failures';

export { hashOptions } from './password-hash';

export interface SessionService {
  /**
   * The account that e-mail and password open; throws `wrong-credentials`, the same for every cause, or `too-many`
   * after five wrong ones within a quarter of an hour.
   */
  check(email: string, password: string): Promise<Account>;
  info(personId: number | null): Promise<SessionInfo>;
  /** Makes a one-time link for a person and puts it into the outbox; older links of the kind end. */
  sendLink(personId: number, kind: links.LinkKind): Promise<void>;
  /** Sends a reset link when the address has an open account; the answer never tells. */
  requestReset(email: string): Promise<void>;
  /** Throws 404 or 410. */
  openLink(token: string): Promise<AccountLink>;
  /** Sets the password through a link. Throws 400, 404, 410. */
  spendLink(token: string, password: string): Promise<void>;
  /** Every other session of the person ends; answers the account to sign in again with. Throws 400, 429. */
  changePassword(personId: number, current: string, next: string): Promise<Account>;
  /** The demo accounts. Throws 404 outside of the demo. */
  demo(): Promise<DemoInfo>;
}

interface MeRow {
  id: number;
  name: string;
  email: string;
  business_name: string | null;
  zone: string;
  temperature_unit: 'F' | 'C';
}

/** Signing in, one-time links, and what the pages know of the person who is signed in. */
export function createSessionService(deps: Deps): SessionService {
  const { db, config } = deps;

  async function check(email: string, password: string): Promise<Account> {
    await countTry(deps, email);
    const account = await findAccount(db, { email: email.toLowerCase() });
    const right = await verifyPassword(account?.passwordHash ?? null, password);
    if (!right || !account?.active)
      throw new AppError('wrong-credentials', 'Check both and try again, or ask for a new password.');
    await forgetFailures(deps, email);
    return account;
  }

  return {
    check,
    sendLink: (personId, kind) => links.sendLink(deps, personId, kind),
    requestReset: (email) => links.requestReset(deps, email),
    openLink: (token) => links.openLink(deps, token),
    spendLink: (token, password) => links.spendLink(deps, token, password),
    demo: () => demoInfo(deps),

    async changePassword(personId, current, next) {
      const account = await findAccount(db, { id: personId });
      if (!account) throw notFound('The person');
      checkNewPassword(next, { email: account.email, demo: config.DEMO, path: 'next' });
      await check(account.email, current).catch((error: unknown) => {
        if (error instanceof AppError && error.code === 'wrong-credentials')
          throw badInput([{ path: 'current', message: 'That is not your present password.' }]);
        throw error;
      });
      const hash = await hashPassword(next);
      return deps.transaction(async (tx) => {
        await setPassword(tx.db, personId, hash, tx.clock.nowIso());
        await links.endOpenLinks(tx, personId);
        await tx.services.history.add({
          actorId: personId,
          actorName: account.name,
          subjectKind: 'person',
          subjectId: personId,
          action: 'password',
          text: `${account.name} changed the password.`,
        });
        const renewed = await findAccount(tx.db, { id: personId });
        return renewed ?? account;
      });
    },

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
