import { createHash, createHmac } from 'node:crypto';
import type { Config } from '../config';
import type { Deps } from '../deps';
import { publicHost, sender } from './addresses';
import { calendarText, type Mailbox, type PlannedEvent } from './calendar-text';
import { findInvitation, saveInvitation, type CalendarMethod, type Subject } from './invitation-queries';

export interface InvitationMessage {
  readonly uid: string;
  readonly sequence: number;
  readonly method: CalendarMethod;
  /** The iTIP message. */
  readonly text: string;
  /** The event was not in the person's calendar before. */
  readonly isNew: boolean;
  readonly event: PlannedEvent;
}

export interface Invitee extends Mailbox {
  readonly id: number;
}

/**
 * Brings an event into a person's calendar or changes it there. Null when it stands there already with the same content:
 * then nothing is to be sent. The sequence rises with every message.
 */
export async function requestEvent(
  deps: Deps,
  subject: Subject,
  person: Invitee,
  event: PlannedEvent,
): Promise<InvitationMessage | null> {
  const before = await findInvitation(deps.db, subject, person.id);
  const contentHash = hashOf({ event, email: person.email });
  if (before?.method === 'REQUEST' && before.contentHash === contentHash) return null;
  const isNew = before?.method !== 'REQUEST';
  return write(deps, subject, person, { before, method: 'REQUEST', event, contentHash, isNew });
}

/** Takes an event out of a person's calendar; null when it does not stand there. */
export async function cancelEvent(
  deps: Deps,
  subject: Subject,
  person: Invitee,
): Promise<InvitationMessage | null> {
  const before = await findInvitation(deps.db, subject, person.id);
  if (before?.method !== 'REQUEST') return null;
  const { event } = before;
  return write(deps, subject, person, { before, method: 'CANCEL', event, contentHash: '', isNew: false });
}

interface Change {
  readonly before: { readonly uid: string; readonly sequence: number } | null;
  readonly method: CalendarMethod;
  readonly event: PlannedEvent;
  readonly contentHash: string;
  readonly isNew: boolean;
}

async function write(
  { config, db, clock }: Deps,
  subject: Subject,
  person: Invitee,
  change: Change,
): Promise<InvitationMessage> {
  const { before, method, event, contentHash, isNew } = change;
  const uid = before?.uid ?? calendarUid(config, subject, person.id);
  const sequence = before === null ? 0 : before.sequence + 1;
  const updatedAt = clock.nowIso();
  await saveInvitation(db, {
    uid,
    personId: person.id,
    subject,
    sequence,
    method,
    contentHash,
    event,
    updatedAt,
  });
  const entry = { uid, sequence, stamp: updatedAt, event, organizer: sender(config), attendee: person };
  return { uid, sequence, method, text: calendarText(method, entry), isNew, event };
}

/**
 * The UID of a person's event for life. To anybody without the site's secret it is 128 random bits (RFC 7986 5.3); it is
 * derived rather than drawn so that an event saved before the first invitation is the same one.
 */
export function calendarUid(config: Config, subject: Subject, personId: number): string {
  const label = `calendar uid ${subject.kind} ${subject.id} person ${personId}`;
  const bits = createHmac('sha256', config.SESSION_SECRET).update(label).digest('hex').slice(0, 32);
  return `${bits}@${publicHost(config)}`;
}

const hashOf = (content: unknown): string =>
  createHash('sha256').update(JSON.stringify(content)).digest('base64url');
