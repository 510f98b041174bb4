import ical, {
  ICalAlarmType,
  ICalAttendeeRole,
  ICalAttendeeStatus,
  ICalAttendeeType,
  type ICalCalendar,
  ICalCalendarMethod,
  ICalEventStatus,
} from 'ical-generator';
import { DateTime } from 'luxon';
import { timeZoneBlock } from './time-zone-block';
import { oneLine } from './words';

/** What an event says, without who is invited and how often it has changed. Times are instants. */
export interface PlannedEvent {
  readonly start: string;
  readonly end: string;
  /** The clock the times are written in. */
  readonly zone: string;
  readonly summary: string;
  readonly description: string;
  readonly location: string;
  readonly url: string | null;
  /** A reminder so many minutes before the start; null for none. */
  readonly alarmMinutes: number | null;
}

export interface Mailbox {
  readonly name: string;
  readonly email: string;
}

export interface CalendarEntry {
  readonly uid: string;
  readonly sequence: number;
  /** UTC ISO instant of this message. */
  readonly stamp: string;
  readonly event: PlannedEvent;
  readonly organizer: Mailbox;
  /** Exactly the person addressed; null in a published feed (RFC 5546 3.2.1 allows no ATTENDEE there). */
  readonly attendee: Mailbox | null;
}

/**
 * One iTIP message (RFC 5546) with a VTIMEZONE for each TZID, CRLF lines of at most 75 octets. CANCEL carries
 * STATUS:CANCELLED and no alarm.
 */
export function calendarText(method: 'REQUEST' | 'CANCEL', entry: CalendarEntry): string {
  const calendar = emptyCalendar(method);
  addEvent(calendar, entry, method === 'CANCEL');
  return `${calendar.toString()}\r\n`;
}

export interface PublishOptions {
  readonly name?: string;
  /** How long a calendar may wait before it looks again (RFC 7986 5.7). */
  readonly lookAgainMinutes?: number;
  /** The zone that a calendar without events names: RFC 5545 3.6 asks for one component at least. */
  readonly zone: string;
}

/** Events to subscribe to or to save: METHOD:PUBLISH (RFC 5546 3.2.1), nobody invited. */
export function publishedCalendar(entries: readonly CalendarEntry[], options: PublishOptions): string {
  const calendar = emptyCalendar('PUBLISH');
  if (options.name !== undefined) calendar.name(oneLine(options.name));
  for (const entry of entries) addEvent(calendar, entry, false);
  const text = withLookAgain(`${calendar.toString()}\r\n`, options.lookAgainMinutes);
  if (entries.length > 0) return text;
  const zone = timeZoneBlock(options.zone) ?? timeZoneBlock('America/Chicago') ?? '';
  return text.replace('END:VCALENDAR', () => `${zone.trimEnd()}\r\nEND:VCALENDAR`);
}

/** The generator would write these after the components, where RFC 5545 3.6 allows no property any more. */
function withLookAgain(text: string, minutes: number | undefined): string {
  if (minutes === undefined) return text;
  const method = '\r\nMETHOD:PUBLISH\r\n';
  const span = `PT${minutes}M`;
  return text.replace(
    method,
    `${method}REFRESH-INTERVAL;VALUE=DURATION:${span}\r\nX-PUBLISHED-TTL:${span}\r\n`,
  );
}

function emptyCalendar(method: keyof typeof ICalCalendarMethod): ICalCalendar {
  return ical({
    prodId: { company: 'Dayberth', product: 'Dayberth', language: 'EN' },
    method: ICalCalendarMethod[method],
    // A zone for the whole calendar would make DTSTAMP local time; RFC 5545 3.8.7.2 wants it in UTC.
    timezone: { name: null, generator: timeZoneBlock },
  });
}

function addEvent(calendar: ICalCalendar, entry: CalendarEntry, cancelled: boolean): void {
  const { event } = entry;
  const hasZone =
    timeZoneBlock(event.zone) !== null && ![event.start, event.end].some(comesTwice(event.zone));
  const zone = hasZone ? event.zone : null;
  const at = (instant: string) => DateTime.fromISO(instant, { zone: zone ?? 'utc' });
  const created = calendar.createEvent({
    id: entry.uid,
    sequence: entry.sequence,
    stamp: DateTime.fromISO(entry.stamp, { zone: 'utc' }),
    start: at(event.start),
    end: at(event.end),
    timezone: zone,
    summary: oneLine(event.summary),
    description: event.description,
    location: oneLine(event.location),
    ...(event.url === null ? {} : { url: event.url }),
    status: cancelled ? ICalEventStatus.CANCELLED : ICalEventStatus.CONFIRMED,
    organizer: { name: parameterText(entry.organizer.name), email: entry.organizer.email },
    attendees: entry.attendee === null ? [] : [attendee(entry.attendee)],
  });
  if (event.alarmMinutes !== null && !cancelled)
    created.createAlarm({
      type: ICalAlarmType.display,
      triggerBefore: event.alarmMinutes * 60,
      description: oneLine(event.summary),
    });
}

/**
 * Whether the local time of an instant comes twice, in the hour when the clock goes back. RFC 5545 3.3.5 reads it as the
 * first, programs differ, so such an event is written in UTC.
 */
const comesTwice =
  (zone: string) =>
  (instant: string): boolean =>
    DateTime.fromISO(instant, { zone }).getPossibleOffsets().length > 1;

function attendee(person: Mailbox) {
  return {
    name: parameterText(person.name),
    email: person.email,
    rsvp: true,
    role: ICalAttendeeRole.REQ,
    status: ICalAttendeeStatus.NEEDSACTION,
    type: ICalAttendeeType.INDIVIDUAL,
  };
}

/** A parameter value may hold neither quotes nor control characters (RFC 5545 3.2), and knows no backslash escapes. */
const parameterText = (text: string): string => oneLine(text).replaceAll('"', '’').replaceAll('\\', '/');
