import type { DemoInfo } from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import { demoPassword } from './password-rules';
import { findAccount } from './session-queries';

/** In the order of the story they tell. */
const tour = [
  ['breeder@example.org', 'Asks when a sale can travel, books parcels onto safe days and sees them arrive.'],
  ['coordinator@example.org', 'Sees which runs make sense, confirms one and drives it stop by stop.'],
  ['buyer@example.org', 'Knows when and where to collect, and says which mornings suit.'],
  [
    'admin@example.org',
    'Keeps blackout dates, counters, species limits and people, and sees what needs attention.',
  ],
] as const;

/** The demo accounts that exist, their password and where the demo's mail can be read. Throws 404 outside of it. */
export async function demoInfo({ config, db }: Deps): Promise<DemoInfo> {
  if (!config.DEMO) throw notFound('That address');
  const accounts: DemoInfo['accounts'] = [];
  for (const [email, about] of tour) {
    const account = await findAccount(db, { email });
    if (account?.active) accounts.push({ name: account.name, email, roles: [...account.roles], about });
  }
  return { accounts, password: demoPassword, mailboxUrl: config.DEMO_MAILBOX_URL ?? null };
}
