import { createHash, randomBytes } from 'node:crypto';
import type { Deps } from '../deps';

export type LinkKind = 'invitation' | 'reset';

const hour = 3_600_000;
const lifeMs: Readonly<Record<LinkKind, number>> = { invitation: 7 * 24 * hour, reset: hour };

/** Only this stands in the table: somebody who reads the database opens no account with it. */
const hashOf = (token: string) => createHash('sha256').update(token).digest('hex');

/** Makes a one-time link (an invitation lives 7 days, a reset 1 h) and tells the person; older ones of the kind end. */
export async function sendLink(deps: Deps, personId: number, kind: LinkKind): Promise<void> {
  await deps.transaction(async (tx) => {
    const token = randomBytes(32).toString('base64url');
    const expiresAt = new Date(tx.clock.nowMs() + lifeMs[kind]).toISOString();
    await tx
      .db('account_links')
      .where({ person_id: personId, kind })
      .whereNull('used_at')
      .update({ used_at: tx.clock.nowIso() });
    await tx.db('account_links').insert({
      person_id: personId,
      kind,
      token_hash: hashOf(token),
      created_at: tx.clock.nowIso(),
      expires_at: expiresAt,
    });
    const url = `${tx.config.PUBLIC_URL}/account-link/${token}`;
    await tx.services.notices.tell({ kind: 'account-link', personId, link: kind, url, expiresAt });
  });
}
