import type { Knex } from 'knex';

interface FeedRow {
  person_id: number;
  token: string;
}

/** The secret of a person's calendar link; null when they have none yet. */
export async function findFeedToken(db: Knex, personId: number): Promise<string | null> {
  const row = await db<FeedRow>('calendar_feeds').where({ person_id: personId }).first();
  return row?.token ?? null;
}

/** Gives a person a secret; with `replace` the old one ends, otherwise the one they have stays. */
export async function saveFeedToken(
  db: Knex,
  feed: { personId: number; token: string; now: string },
  replace: boolean,
): Promise<void> {
  const insert = db('calendar_feeds')
    .insert({ person_id: feed.personId, token: feed.token, created_at: feed.now })
    .onConflict('person_id');
  await (replace ? insert.merge(['token', 'created_at']) : insert.ignore());
}

export interface FeedOwner {
  readonly id: number;
  readonly zone: string;
  readonly active: boolean;
}

/** Whose calendar a secret opens; undefined for an unknown or revoked one and for a shut account. */
export async function findFeedOwner(
  db: Knex,
  token: string,
): Promise<Pick<FeedOwner, 'id' | 'zone'> | undefined> {
  const feed = await db<FeedRow>('calendar_feeds').where({ token }).first();
  if (!feed) return undefined;
  return db<FeedOwner>('people').where({ id: feed.person_id, active: true }).first('id', 'zone');
}
