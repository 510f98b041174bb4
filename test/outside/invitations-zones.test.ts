import ICAL from 'ical.js';
import { DateTime } from 'luxon';
import { calendarText } from '@api/notices/calendar-text';

/**
 * Every TZID must come with a VTIMEZONE (RFC 5545 3.6.5, RFC 5546 3.2.2), and what that says is worked out here by ical.js
 * and held against luxon, which asks the runtime's own zone table.
 */
const zones = [
  'America/New_York',
  'America/Indiana/Indianapolis',
  'America/Chicago',
  'America/Denver',
  'America/Boise',
  'America/Phoenix',
  'America/Los_Angeles',
  'America/Anchorage',
  'Pacific/Honolulu',
  'America/Puerto_Rico',
];
/** US clock changes, 02:00 local: 2026-03-08 and 11-01, 2027-03-14 and 11-07. */
const changeDays = ['2026-03-08', '2026-11-01', '2027-03-14', '2027-11-07'];
const noDaylightTime: Readonly<Record<string, number>> = {
  'America/Phoenix': -7,
  'Pacific/Honolulu': -10,
  'America/Puerto_Rico': -4,
};

function invitation(start: string, end: string, zone: string) {
  const text = calendarText('REQUEST', {
    uid: 'z@circle.example.org',
    sequence: 0,
    stamp: '2026-01-02T03:04:05.000Z',
    organizer: { name: 'Dayberth', email: 'circle@example.org' },
    attendee: { name: 'Bo', email: 'bo@example.org' },
    event: { start, end, zone, summary: 's', description: 'd', location: 'l', url: null, alarmMinutes: null },
  });
  const calendar = new ICAL.Component(ICAL.parse(text));
  const vtimezones = calendar.getAllSubcomponents('vtimezone');
  const vevent = calendar.getFirstSubcomponent('vevent');
  if (!vevent) throw new Error('no event');
  const zonesInside = vtimezones.map((one) => new ICAL.Timezone(one));
  for (const one of zonesInside) ICAL.TimezoneService.register(one, one.tzid);
  const event = new ICAL.Event(vevent);
  return {
    text,
    zonesInside,
    event,
    startParameter: vevent.getFirstProperty('dtstart')?.getParameter('tzid'),
  };
}

const iso = (time: ICAL.Time) => time.toJSDate().toISOString();

describe.each(zones)('Times in %s', (zone) => {
  it('come with exactly the VTIMEZONE that their TZID names', () => {
    const { zonesInside, startParameter } = invitation(
      '2026-12-09T16:00:00.000Z',
      '2026-12-09T18:00:00.000Z',
      zone,
    );
    expect(startParameter).toBe(zone);
    expect(zonesInside.map((one) => one.tzid)).toEqual([zone]);
  });

  it.each(changeDays)('agree with luxon on every hour round %s', (day) => {
    const first = DateTime.fromISO(day, { zone: 'utc' }).minus({ days: 1 });
    const { zonesInside } = invitation(`${day}T20:00:00.000Z`, `${day}T21:00:00.000Z`, zone);
    const [inside] = zonesInside as [ICAL.Timezone];
    for (let hour = 0; hour < 72; hour++) {
      const local = first.plus({ hours: hour }).setZone(zone, { keepLocalTime: true });
      // The skipped hour is no time of day, the hour that comes twice has two offsets: both are left to the next tests.
      if (local.hour !== first.plus({ hours: hour }).hour || local.getPossibleOffsets().length > 1) continue;
      const time = ICAL.Time.fromDateTimeString(local.toFormat("yyyy-MM-dd'T'HH:mm:ss"));
      expect([local.toISO(), inside.utcOffset(time) / 60]).toEqual([local.toISO(), local.offset]);
    }
  });

  it.each([
    '2026-01-15T17:00:00.000Z',
    '2026-03-07T17:00:00.000Z',
    '2026-03-08T17:00:00.000Z',
    '2026-07-04T17:00:00.000Z',
    '2026-10-31T17:00:00.000Z',
    '2026-11-01T17:00:00.000Z',
    '2027-03-14T17:00:00.000Z',
    '2027-11-07T17:00:00.000Z',
  ])('bring %s back as the same instant', (start) => {
    const end = new Date(Date.parse(start) + 2 * 3_600_000).toISOString();
    const { event } = invitation(start, end, zone);
    expect([iso(event.startDate), iso(event.endDate)]).toEqual([start, end]);
    expect(event.startDate.hour).toBe(DateTime.fromISO(start, { zone }).hour);
  });
});

describe('Places that keep one time all year', () => {
  it.each(Object.entries(noDaylightTime))('%s is %d h from UTC in winter and summer', (zone, hours) => {
    for (const day of ['2026-01-15', '2026-07-15', ...changeDays]) {
      const { event } = invitation(`${day}T20:00:00.000Z`, `${day}T21:00:00.000Z`, zone);
      expect(event.startDate.hour).toBe(20 + hours);
    }
  });
});

describe('The day of 25 hours, 1 November 2026', () => {
  it('lasts from midnight to midnight for 25 hours', () => {
    const { event } = invitation('2026-11-01T05:00:00.000Z', '2026-11-02T06:00:00.000Z', 'America/Chicago');
    expect(event.startDate.toString()).toBe('2026-11-01T00:00:00');
    expect(event.endDate.toString()).toBe('2026-11-02T00:00:00');
    expect((Date.parse(iso(event.endDate)) - Date.parse(iso(event.startDate))) / 3_600_000).toBe(25);
  });

  it.each([
    ['first', '2026-11-01T06:30:00.000Z'],
    ['second', '2026-11-01T07:30:00.000Z'],
  ])(
    'keeps the %s 01:30 apart from the other (RFC 5545 3.3.5 means the first, ical.js reads the second: so in UTC)',
    (_, start) => {
      const { event } = invitation(start, '2026-11-01T09:00:00.000Z', 'America/Chicago');
      expect(iso(event.startDate)).toBe(start);
    },
  );
});

describe('The day of 23 hours, 8 March 2026', () => {
  it('has no 02:30, and three in the morning comes an hour after one o’clock ends', () => {
    const { event } = invitation('2026-03-08T07:59:00.000Z', '2026-03-08T08:01:00.000Z', 'America/Chicago');
    expect(event.startDate.toString()).toBe('2026-03-08T01:59:00');
    expect(event.endDate.toString()).toBe('2026-03-08T03:01:00');
  });
});
