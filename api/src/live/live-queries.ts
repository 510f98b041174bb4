import type { Knex } from 'knex';
import { liveKind, type LiveChange, type Role } from '@shared/contract';

export interface LoggedChange extends LiveChange {
  readonly historyId: number;
}

/** The newest entry of the history; 0 when there is none. */
export async function newestHistoryId(db: Knex): Promise<number> {
  const row = (await db('history').max({ id: 'id' }).first()) as { id: number | null } | undefined;
  return row?.id ?? 0;
}

/** What was written into the history after an entry, oldest first; kinds that no page shows are left out. */
export async function changesAfter(db: Knex, historyId: number, most: number): Promise<LoggedChange[]> {
  const rows = await db('history')
    .where('id', '>', historyId)
    .orderBy('id')
    .limit(most)
    .select<{ historyId: number; kind: string; id: number }[]>({
      historyId: 'id',
      kind: 'subject_kind',
      id: 'subject_id',
    });
  return rows.flatMap(({ historyId: at, kind, id }) => {
    const known = liveKind.safeParse(kind);
    return known.success ? [{ historyId: at, kind: known.data, id }] : [];
  });
}

interface PersonRow {
  id: number;
  active: number;
  session_epoch: number;
}

/** The people among these who may still be signed in, by id, with the number that a change of password raises. */
export async function openAccounts(
  db: Knex,
  personIds: readonly number[],
): Promise<ReadonlyMap<number, { readonly sessionEpoch: number; readonly roles: readonly Role[] }>> {
  const people = await db<PersonRow>('people')
    .whereIn('id', [...personIds])
    .where('active', true as never);
  const roles = await db<{ person_id: number; role: Role }>('person_roles').whereIn('person_id', [
    ...personIds,
  ]);
  return new Map(
    people.map(({ id, session_epoch }) => [
      id,
      {
        sessionEpoch: session_epoch,
        roles: roles.filter((row) => row.person_id === id).map(({ role }) => role),
      },
    ]),
  );
}

/** Those of the sessions that are still there. */
export async function openSessions(db: Knex, sessionIds: readonly string[]): Promise<ReadonlySet<string>> {
  const rows = await db<{ sid: string }>('sessions')
    .whereIn('sid', [...sessionIds])
    .select('sid');
  return new Set(rows.map(({ sid }) => sid));
}
