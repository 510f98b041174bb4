import type { Deps } from '../deps';

const dayMs = 86_400_000;

/**
 * Takes out sessions that ended, account links that ended a month ago and sign-in failures of yesterday; answers how
 * many sessions went. Sessions go by the database's clock, as the session store stamps them with the machine's.
 */
export async function cleanSessions({ db, clock }: Deps): Promise<number> {
  const sessions = await db('sessions').whereRaw("datetime(expired) <= datetime('now')").delete();
  const before = (ms: number) => new Date(clock.nowMs() - ms).toISOString();
  await db('account_links')
    .where('expires_at', '<', before(30 * dayMs))
    .delete();
  await db('sign_in_failures').where('last_at', '<', before(dayMs)).delete();
  return sessions;
}
