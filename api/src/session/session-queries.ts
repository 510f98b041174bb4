import type { Knex } from 'knex';
import type { Role } from '@shared/contract';
import type { Actor } from '../http/actor';

interface AccountRow {
  id: number;
  name: string;
  email: string;
  zone: string;
  active: number;
  session_epoch: number;
  password_hash: string | null;
}

export interface Account extends Actor {
  readonly active: boolean;
  readonly sessionEpoch: number;
  readonly passwordHash: string | null;
}

/** The account with this id or e-mail, with its roles; null when there is none. */
export async function findAccount(db: Knex, by: { id: number } | { email: string }): Promise<Account | null> {
  const row = await db<AccountRow>('people').where(by).first();
  if (!row) return null;
  const roles = await db<{ person_id: number; role: Role }>('person_roles')
    .where({ person_id: row.id })
    .orderBy('role');
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    zone: row.zone,
    roles: roles.map((r) => r.role),
    active: Boolean(row.active),
    sessionEpoch: row.session_epoch,
    passwordHash: row.password_hash,
  };
}

/** Stores a password hash and ends every session of the person. */
export async function setPassword(db: Knex, id: number, passwordHash: string, at: string): Promise<void> {
  await db<AccountRow>('people').where({ id }).increment('session_epoch', 1);
  await db('people').where({ id }).update({ password_hash: passwordHash, updated_at: at });
}
