import type { Knex } from 'knex';
import type { CalendarMethod } from './invitation-queries';

interface OutboxRow {
  id: number;
  idempotency_key: string;
  to_email: string;
  to_name: string;
  subject: string;
  text: string;
  html: string;
  ical: string | null;
  ical_method: CalendarMethod | null;
  state: 'waiting' | 'sending' | 'sent' | 'failed';
  attempts: number;
  next_attempt_at: string;
  claimed_at: string | null;
  last_error: string | null;
  message_id: string;
  created_at: string;
  sent_at: string | null;
}

export interface CalendarPart {
  readonly method: CalendarMethod;
  readonly text: string;
}

export interface OutboxMail {
  readonly key: string;
  readonly toEmail: string;
  readonly toName: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly calendar: CalendarPart | null;
  readonly messageId: string;
}

export interface ClaimedMail extends OutboxMail {
  readonly id: number;
  /** Attempts including the present one. */
  readonly attempts: number;
  readonly claimedAt: string;
}

/** Writes a mail; one with the same key stands already: nothing happens. `error` files it as failed at once. */
export async function insertMail(
  db: Knex,
  mail: OutboxMail,
  now: string,
  error: string | null,
): Promise<void> {
  await db('outbox')
    .insert({
      idempotency_key: mail.key,
      to_email: mail.toEmail,
      to_name: mail.toName,
      subject: mail.subject,
      text: mail.text,
      html: mail.html,
      ical: mail.calendar?.text ?? null,
      ical_method: mail.calendar?.method ?? null,
      message_id: mail.messageId,
      state: error === null ? 'waiting' : 'failed',
      last_error: error,
      next_attempt_at: now,
      created_at: now,
    })
    .onConflict('idempotency_key')
    .ignore();
}

/**
 * Claims up to `limit` mails that are due, and those claimed before `staleBefore` (their process stopped midway), in one
 * statement: two drains never claim the same mail. One that was claimed in vain too often is given up first.
 */
export async function claimMails(
  db: Knex,
  now: string,
  staleBefore: string,
  limits: { count: number; maxAttempts: number },
): Promise<ClaimedMail[]> {
  const stale = (q: Knex.QueryBuilder<OutboxRow>) =>
    q.where('state', 'sending').where('claimed_at', '<', staleBefore);
  await stale(db<OutboxRow>('outbox'))
    .where('attempts', '>=', limits.maxAttempts)
    .update({ state: 'failed', last_error: 'The sending never came to an end.', claimed_at: null });
  const due = db<OutboxRow>('outbox')
    .select('id')
    .where((q) => void q.where('state', 'waiting').where('next_attempt_at', '<=', now))
    .orWhere((q) => void stale(q as Knex.QueryBuilder<OutboxRow>))
    .orderBy([{ column: 'next_attempt_at' }, { column: 'id' }])
    .limit(limits.count);
  const attempts = db.raw('attempts + 1') as unknown as number;
  const rows: OutboxRow[] = await db<OutboxRow>('outbox')
    .whereIn('id', due)
    .update({ state: 'sending', claimed_at: now, attempts })
    .returning('*');
  return rows.toSorted((a, b) => a.id - b.id).map((row) => ({ ...toMail(row), claimedAt: now }));
}

function toMail(row: OutboxRow): OutboxMail & { id: number; attempts: number } {
  const calendar =
    row.ical !== null && row.ical_method !== null ? { method: row.ical_method, text: row.ical } : null;
  return {
    id: row.id,
    attempts: row.attempts,
    key: row.idempotency_key,
    toEmail: row.to_email,
    toName: row.to_name,
    subject: row.subject,
    text: row.text,
    html: row.html,
    calendar,
    messageId: row.message_id,
  };
}

export type Outcome =
  | { readonly state: 'sent'; readonly at: string }
  | { readonly state: 'waiting'; readonly error: string; readonly nextAttemptAt: string }
  | { readonly state: 'failed'; readonly error: string };

/** Files what became of a claimed mail; nothing when the claim has gone to somebody else meanwhile. */
export async function settleMail(db: Knex, mail: ClaimedMail, outcome: Outcome): Promise<void> {
  await db<OutboxRow>('outbox')
    .where({ id: mail.id, state: 'sending', claimed_at: mail.claimedAt })
    .update({
      state: outcome.state,
      claimed_at: null,
      ...(outcome.state === 'sent'
        ? { sent_at: outcome.at, last_error: null }
        : { last_error: outcome.error }),
      ...(outcome.state === 'waiting' ? { next_attempt_at: outcome.nextAttemptAt } : {}),
    });
}

/**
 * Takes mails back that nobody has tried to send and that take an event out of a calendar, by the end of their key; answers
 * their calendar parts in their order.
 */
export async function takeBackMails(db: Knex, keyEnd: string): Promise<CalendarPart[]> {
  const rows = await db<OutboxRow>('outbox')
    .where({ state: 'waiting', attempts: 0, ical_method: 'CANCEL' })
    .whereRaw('substr(idempotency_key, -?) = ?', [keyEnd.length, keyEnd])
    .orderBy('id');
  if (rows.length === 0) return [];
  await db('outbox')
    .whereIn(
      'id',
      rows.map((row) => row.id),
    )
    .del();
  return rows.flatMap((row) => toMail(row).calendar ?? []);
}

export async function countMails(db: Knex): Promise<{ waiting: number; failed: number }> {
  const rows = await db<OutboxRow>('outbox').whereNot('state', 'sent').select('state');
  const failed = rows.filter((row) => row.state === 'failed').length;
  return { waiting: rows.length - failed, failed };
}

export interface FailedMail {
  readonly id: number;
  readonly to: string;
  readonly subject: string;
  readonly error: string;
  readonly at: string;
}

/** The newest failed mails first, at most `limit`; `at` is when the mail was written. */
export async function failedMails(db: Knex, limit: number): Promise<FailedMail[]> {
  const rows = await db<OutboxRow>('outbox').where({ state: 'failed' }).orderBy('id', 'desc').limit(limit);
  return rows.map((row) => ({
    id: row.id,
    to: row.to_email,
    subject: row.subject,
    error: row.last_error ?? '',
    at: row.created_at,
  }));
}

/** Puts a failed mail back with all its attempts; says whether there was one. */
export async function requeueMail(db: Knex, id: number, now: string): Promise<boolean> {
  const changed = await db<OutboxRow>('outbox')
    .where({ id, state: 'failed' })
    .update({ state: 'waiting', attempts: 0, next_attempt_at: now, last_error: null });
  return changed > 0;
}
