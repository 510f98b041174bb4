import { randomBytes } from 'node:crypto';
import type { CalendarFeed, Parcel } from '@shared/contract';
import { notFound } from '@shared/errors';
import type { Deps } from '../deps';
import { pageUrl, sender } from '../notices/addresses';
import { publishedCalendar, type CalendarEntry } from '../notices/calendar-text';
import type { Invitation } from '../notices/invitation-queries';
import { calendarUid } from '../notices/invitations';
import { arrivalEvent, collectionWindow } from '../notices/planned-events';
import { findFeedOwner, findFeedToken, saveFeedToken } from './calendars-queries';

export interface CalendarsService {
  /** The address of a person's feed; the first time it is made. */
  feedOf(personId: number): Promise<CalendarFeed>;
  /** A new address; the old one answers 404 from now on. */
  renewFeed(personId: number): Promise<CalendarFeed>;
  /** The person's coming runs and arrivals as iCalendar text, by the secret of the feed. Throws 404. */
  feedText(token: string): Promise<string>;
  /** One arrival to put into a calendar, by the secret of the buyer's link. Throws 404, also while no day stands. */
  arrivalText(token: string): Promise<string>;
}

/** What is longer past is left out, so that a feed does not grow for ever. Assumption. */
const pastDays = 60;
/** How often a calendar should look again (RFC 7986 5.7). */
const lookAgainMinutes = 60;

/** Calendars by secret address. An event has the same UID here and in its invitation, so that nobody sees it twice. */
export function createCalendarsService(deps: Deps): CalendarsService {
  const give = async (personId: number, replace: boolean): Promise<CalendarFeed> => {
    const token = randomBytes(24).toString('base64url');
    await saveFeedToken(deps.db, { personId, token, now: deps.clock.nowIso() }, replace);
    return { url: feedUrl(deps, (await findFeedToken(deps.db, personId)) ?? token) };
  };
  return {
    async feedOf(personId) {
      const token = await findFeedToken(deps.db, personId);
      return token === null ? give(personId, false) : { url: feedUrl(deps, token) };
    },
    renewFeed: (personId) => give(personId, true),
    feedText: (token) => feedText(deps, token),
    arrivalText: (token) => arrivalText(deps, token),
  };
}

const feedUrl = ({ config }: Deps, token: string): string => pageUrl(config, `/api/calendars/${token}.ics`);

async function feedText(deps: Deps, token: string): Promise<string> {
  const { db, services, clock } = deps;
  const owner = await findFeedOwner(db, token);
  if (!owner) throw notFound('That calendar');
  const invitations = await services.notices.invitationsOf(owner.id);
  // What was taken back stays away until it is said again: the mail about it has said so.
  const told = new Set(
    invitations.flatMap(({ subject }) => (subject.kind === 'arrival' ? [subject.id] : [])),
  );
  const entries = invitations
    .filter(({ method }) => method === 'REQUEST')
    .map((invitation) => invitedEntry(deps, invitation));
  for (const parcel of await services.parcels.ofBuyer(owner.id)) {
    const entry = told.has(parcel.id) ? null : await plannedEntry(deps, parcel, 0);
    if (entry) entries.push(entry);
  }
  const since = new Date(clock.nowMs() - pastDays * 86_400_000).toISOString();
  const { policy } = await services.policy.current();
  return publishedCalendar(
    entries.filter((entry) => entry.event.end >= since),
    { name: policy.circleName, lookAgainMinutes, zone: owner.zone },
  );
}

async function arrivalText(deps: Deps, token: string): Promise<string> {
  const parcel = await deps.services.parcels.byToken(token);
  const last = (await deps.services.notices.invitationsOf(parcel.buyer.id)).find(
    ({ subject }) => subject.kind === 'arrival' && subject.id === parcel.id,
  );
  const entry =
    last?.method === 'REQUEST'
      ? invitedEntry(deps, last)
      : await plannedEntry(deps, parcel, last?.sequence ?? 0);
  if (!entry) throw notFound('A planned arrival');
  return publishedCalendar([entry], { zone: entry.event.zone });
}

const invitedEntry = ({ config }: Deps, invitation: Invitation): CalendarEntry => ({
  uid: invitation.uid,
  sequence: invitation.sequence,
  stamp: invitation.updatedAt,
  event: invitation.event,
  organizer: sender(config),
  attendee: null,
});

/** An arrival whose day stands but that no invitation tells of at present; null while no day stands. */
async function plannedEntry(deps: Deps, parcel: Parcel, sequence: number): Promise<CalendarEntry | null> {
  const { config, services } = deps;
  if (parcel.arrivalDate === null) return null;
  const arrival = await services.arrivals.byToken(parcel.arrivalUrl.split('/').at(-1) ?? '');
  const window = collectionWindow(arrival, parcel.shipDate);
  if (!window || arrival.status === 'cancelled' || arrival.status === 'on-hold') return null;
  return {
    uid: calendarUid(config, { kind: 'arrival', id: parcel.id }, parcel.buyer.id),
    sequence,
    stamp: parcel.updatedAt,
    event: arrivalEvent(arrival, window, parcel.arrivalUrl),
    organizer: sender(config),
    attendee: null,
  };
}
