import type { Knex } from 'knex';
import type { PlannedEvent } from './calendar-text';

export type CalendarMethod = 'REQUEST' | 'CANCEL';

/** A run or an arrival (by its parcel): what an invitation is about. */
export interface Subject {
  readonly kind: 'run' | 'arrival';
  readonly id: number;
}

export interface Invitation {
  readonly uid: string;
  readonly personId: number;
  readonly subject: Subject;
  readonly sequence: number;
  readonly method: CalendarMethod;
  readonly contentHash: string;
  readonly event: PlannedEvent;
  readonly updatedAt: string;
}

interface InvitationRow {
  uid: string;
  person_id: number;
  subject_kind: Subject['kind'];
  subject_id: number;
  sequence: number;
  method: CalendarMethod;
  content_hash: string;
  event: string;
  updated_at: string;
}

const toInvitation = (row: InvitationRow): Invitation => ({
  uid: row.uid,
  personId: row.person_id,
  subject: { kind: row.subject_kind, id: row.subject_id },
  sequence: row.sequence,
  method: row.method,
  contentHash: row.content_hash,
  event: JSON.parse(row.event) as PlannedEvent,
  updatedAt: row.updated_at,
});

export async function findInvitation(
  db: Knex,
  subject: Subject,
  personId: number,
): Promise<Invitation | null> {
  const row = await db<InvitationRow>('invitations')
    .where({ subject_kind: subject.kind, subject_id: subject.id, person_id: personId })
    .first();
  return row ? toInvitation(row) : null;
}

/** Writes the present state of an invitation; the UID of the first time stays. */
export async function saveInvitation(db: Knex, invitation: Invitation): Promise<void> {
  await db('invitations')
    .insert({
      uid: invitation.uid,
      person_id: invitation.personId,
      subject_kind: invitation.subject.kind,
      subject_id: invitation.subject.id,
      sequence: invitation.sequence,
      method: invitation.method,
      content_hash: invitation.contentHash,
      event: JSON.stringify(invitation.event),
      updated_at: invitation.updatedAt,
    })
    .onConflict(['person_id', 'subject_kind', 'subject_id'])
    .merge(['sequence', 'method', 'content_hash', 'event', 'updated_at']);
}

/** Ids of the people in whose calendar the subject stands at present. */
export async function invitedPeople(db: Knex, subject: Subject): Promise<number[]> {
  const rows = await db<InvitationRow>('invitations')
    .where({ subject_kind: subject.kind, subject_id: subject.id, method: 'REQUEST' })
    .orderBy('person_id');
  return rows.map((row) => row.person_id);
}

/** Everything a person was ever invited to, as it was last said, in the order it was first said. */
export async function invitationsOf(db: Knex, personId: number): Promise<Invitation[]> {
  const rows = await db<InvitationRow>('invitations').where({ person_id: personId }).orderBy('id');
  return rows.map(toInvitation);
}
