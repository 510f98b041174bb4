import { createHash, randomBytes } from 'node:crypto';
import type { Knex } from 'knex';
import type { AccountLink } from '@shared/contract';
import { AppError, notFound } from '@shared/errors';
import type { Deps } from '../deps';
import { checkNewPassword } from './password-rules';
import { hashPassword } from './password-hash';
import { findAccount, setPassword, type Account } from './session-queries';
import { forgetFailures } from './sign-in-failures';

export type LinkKind = 'invitation' | 'reset';

interface LinkRow {
  id: number;
  person_id: number;
  kind: LinkKind;
  token_hash: string;
  created_at: string;
  expires_at: string;
  used_at: string | null;
}

const hourMs = 3_600_000;
const lifeMs: Readonly<Record<LinkKind, number>> = { invitation: 7 * 24 * hourMs, reset: hourMs };
/** More reset mails than this in an hour are not sent: nobody's mailbox is flooded from here. */
const mostResetsInAnHour = 3;

/** Only this stands in the table: somebody who reads the database opens no account with it. */
const hashOf = (token: string) => createHash('sha256').update(token).digest('hex');

/** Makes a one-time link (an invitation lives 7 days, a reset 1 h) and tells the person; older ones of the kind end. */
export function sendLink(deps: Deps, personId: number, kind: LinkKind): Promise<void> {
  return deps.transaction(async (tx) => {
    const { url, expiresAt } = await makeLink(tx, personId, kind);
    await tx.services.notices.tell({ kind: 'account-link', personId, link: kind, url, expiresAt });
  });
}

/** The same without telling anybody: for a first admin, who reads it on the machine itself. In the present transaction. */
export async function makeLink(
  tx: Deps,
  personId: number,
  kind: LinkKind,
): Promise<{ url: string; expiresAt: string }> {
  const token = randomBytes(32).toString('base64url');
  const expiresAt = new Date(tx.clock.nowMs() + lifeMs[kind]).toISOString();
  await endOpenLinks(tx, personId, kind);
  await tx.db('account_links').insert({
    person_id: personId,
    kind,
    token_hash: hashOf(token),
    created_at: tx.clock.nowIso(),
    expires_at: expiresAt,
  });
  return { url: `${tx.config.PUBLIC_URL.replace(/\/$/, '')}/account-link/${token}`, expiresAt };
}

/** Sends a reset link when the address has an open account; says nothing about whether it has. */
export function requestReset(deps: Deps, email: string): Promise<void> {
  return deps.transaction(async (tx) => {
    const account = await findAccount(tx.db, { email });
    if (!account?.active) return;
    const since = new Date(tx.clock.nowMs() - hourMs).toISOString();
    const recent = await tx
      .db<LinkRow>('account_links')
      .where({ person_id: account.id, kind: 'reset' })
      .where('created_at', '>', since);
    if (recent.length < mostResetsInAnHour) await sendLink(tx, account.id, 'reset');
  });
}

/** Whose link it is. Throws 404 for a token that never was, 410 for one used, replaced or expired. */
export async function openLink({ db, clock }: Deps, token: string): Promise<AccountLink> {
  const { link, account } = await findOpenLink(db, token, clock.nowIso());
  return { kind: link.kind, name: account.name, email: account.email };
}

/** Sets the password through a link: every session and every other link of the person ends. Signs nobody in. */
export async function spendLink(deps: Deps, token: string, password: string): Promise<void> {
  const before = await findOpenLink(deps.db, token, deps.clock.nowIso());
  checkNewPassword(password, { email: before.account.email, demo: deps.config.DEMO, path: 'password' });
  // Hashing takes its time on purpose: not while the one connection is held.
  const hash = await hashPassword(password);
  await deps.transaction(async (tx) => {
    const { link, account } = await findOpenLink(tx.db, token, tx.clock.nowIso());
    await setPassword(tx.db, account.id, hash, tx.clock.nowIso());
    await endOpenLinks(tx, account.id);
    await forgetFailures(tx, account.email);
    await tx.services.history.add({
      actorId: account.id,
      actorName: account.name,
      subjectKind: 'person',
      subjectId: account.id,
      action: 'password',
      text: `${account.name} set a password through ${link.kind === 'reset' ? 'a reset link' : 'the invitation'}.`,
    });
  });
}

async function findOpenLink(
  db: Knex,
  token: string,
  nowIso: string,
): Promise<{ link: LinkRow; account: Account }> {
  const link = await db<LinkRow>('account_links')
    .where({ token_hash: hashOf(token) })
    .first();
  if (!link) throw notFound('This link');
  const account = await findAccount(db, { id: link.person_id });
  if (link.used_at !== null || link.expires_at <= nowIso || !account?.active)
    throw new AppError('gone', 'Ask for a new one: each link works once and not for ever.');
  return { link, account };
}

/** Ends the person's links that could still be used, of one kind or of both. */
export async function endOpenLinks({ db, clock }: Deps, personId: number, kind?: LinkKind): Promise<void> {
  await db<LinkRow>('account_links')
    .where({ person_id: personId, ...(kind ? { kind } : {}) })
    .whereNull('used_at')
    .update({ used_at: clock.nowIso() });
}
