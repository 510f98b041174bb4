import ICAL from 'ical.js';
import fc from 'fast-check';
import { calendarText, publishedCalendar, type CalendarEntry } from '@api/notices/calendar-text';
import { addParcel, addRun } from '../support/run-rows';
import { createMailSite, invitationTo, onlyMailTo, type MailSite } from '../support/mail-site';

const entry = (changes: Partial<CalendarEntry['event']> = {}, name = 'Bo Buyer'): CalendarEntry => ({
  uid: 'a1@circle.example.org',
  sequence: 2,
  stamp: '2026-12-01T12:00:00.000Z',
  organizer: { name: 'Dayberth', email: 'circle@example.org' },
  attendee: { name, email: 'bo@example.org' },
  event: {
    start: '2026-12-09T16:00:00.000Z',
    end: '2026-12-09T18:00:00.000Z',
    zone: 'America/Phoenix',
    summary: 'Collect your corn snake',
    description: 'Bring a photo ID.',
    location: 'Phoenix counter, 100 Ramp Road, Phoenix, AZ 85034',
    url: 'https://circle.example.org/a/token',
    alarmMinutes: 60,
    ...changes,
  },
});

const read = (text: string) => {
  const calendar = new ICAL.Component(ICAL.parse(text));
  const vevent = calendar.getFirstSubcomponent('vevent');
  if (!vevent) throw new Error('no event');
  return { calendar, vevent };
};
const octets = (line: string) => Buffer.byteLength(line, 'utf8');

/** Texts as people type them: every sign that iCalendar treats in its own way, other scripts, signs of four octets. */
const typed = fc
  .array(
    fc.oneof(
      fc.constantFrom(
        ',',
        ';',
        '\\',
        ':',
        '"',
        '\n',
        'ü',
        'ß',
        '東',
        '🦎',
        'é',
        ' ',
        'BEGIN:VEVENT',
        '\\n',
        '\r\n',
      ),
      fc.string({ maxLength: 12 }),
    ),
    { minLength: 1, maxLength: 40 },
  )
  .map((parts) => parts.join(''));

/** Without the control characters that an iCalendar text cannot hold (RFC 5545 3.1: CONTROL). */
const plain = (text: string) => text.replace(/\r\n?/g, '\n').replace(/[^\P{Cc}\n]/gu, '');

describe('The form of a calendar part, whatever people typed', () => {
  it('ends every line with CRLF and folds it at 75 octets, never inside a character (RFC 5545 3.1)', () => {
    fc.assert(
      fc.property(typed, typed, (description, name) => {
        const text = calendarText('REQUEST', entry({ description, location: description }, name));
        expect(text.endsWith('END:VCALENDAR\r\n')).toBe(true);
        expect(text.replaceAll('\r\n', '')).not.toMatch(/[\r\n]/);
        const lines = text.split('\r\n');
        for (const line of lines) expect(octets(line)).toBeLessThanOrEqual(75);
        // A character cut in two would have become U+FFFD on its way through UTF-8.
        expect(text.includes('�')).toBe(description.includes('�') || name.includes('�'));
      }),
      { seed: 5545, numRuns: 200 },
    );
  });

  it('brings a long line back whole when unfolded', () => {
    const description = `${'Bärenzwinger 東京 🦎, '.repeat(30)}end`;
    const text = calendarText('REQUEST', entry({ description }));
    expect(text).toMatch(/\r\n [^\r\n]/);
    expect(read(text).vevent.getFirstPropertyValue('description')).toBe(description);
  });

  it('escapes commas, semicolons, backslashes and line breaks in texts (RFC 5545 3.3.11, from memory)', () => {
    const description = 'One, two; three \\ four\nfive: "six"';
    const text = calendarText('REQUEST', entry({ description }));
    expect(text.replaceAll('\r\n ', '')).toContain('DESCRIPTION:One\\, two\\; three \\\\ four\\nfive: "six"');
    expect(read(text).vevent.getFirstPropertyValue('description')).toBe(description);
  });

  it('brings any text back as it was typed, in one event of one calendar', () => {
    fc.assert(
      fc.property(typed, (description) => {
        const { calendar, vevent } = read(calendarText('REQUEST', entry({ description })));
        expect(calendar.getAllSubcomponents('vevent')).toHaveLength(1);
        expect(plain(String(vevent.getFirstPropertyValue('description') ?? '')).trim()).toBe(
          plain(description).trim(),
        );
      }),
      { seed: 3311, numRuns: 200 },
    );
  });

  it('lets no name break out of its parameter (RFC 5545 3.2: no DQUOTE, no control characters)', () => {
    const name = 'Bo "the; boa" \\ Büyer\r\nATTENDEE:mailto:evil@example.org';
    const { vevent } = read(calendarText('REQUEST', entry({}, name)));
    expect(vevent.getAllProperties('attendee')).toHaveLength(1);
    const cn = vevent.getFirstProperty('attendee')?.getParameter('cn');
    expect(cn).toMatch(/^Bo .the; boa. . Büyer ATTENDEE:mailto:evil@example\.org$/);
  });

  it('puts a reminder into a REQUEST and none into a CANCEL (RFC 5546 3.2.5)', () => {
    const alarms = (method: 'REQUEST' | 'CANCEL') =>
      read(calendarText(method, entry())).vevent.getAllSubcomponents('valarm');
    const [alarm] = alarms('REQUEST');
    // RFC 5545 3.6.6: ACTION, TRIGGER and, for DISPLAY, DESCRIPTION are required.
    expect(alarm?.getFirstPropertyValue('action')).toBe('DISPLAY');
    expect(String(alarm?.getFirstPropertyValue('trigger'))).toBe('-PT1H');
    expect(alarm?.getFirstPropertyValue('description')).toBe('Collect your corn snake');
    expect(alarms('CANCEL')).toEqual([]);
  });

  it('publishes without inviting: no ATTENDEE, an ORGANIZER (RFC 5546 3.2.1, from memory)', () => {
    const { calendar, vevent } = read(
      publishedCalendar([{ ...entry(), attendee: null }], { zone: 'America/Phoenix' }),
    );
    expect(calendar.getFirstPropertyValue('method')).toBe('PUBLISH');
    expect(vevent.getAllProperties('attendee')).toEqual([]);
    expect(vevent.getAllProperties('organizer')).toHaveLength(1);
  });

  it('is a calendar even while there is nothing in it (RFC 5545 3.6: at least one component)', () => {
    const text = publishedCalendar([], {
      name: 'Hill Country circle',
      zone: 'Pacific/Honolulu',
      lookAgainMinutes: 60,
    });
    const calendar = new ICAL.Component(ICAL.parse(text));
    expect(calendar.getAllSubcomponents().map((one) => one.name)).toEqual(['vtimezone']);
    expect(calendar.getFirstPropertyValue('x-wr-calname')).toBe('Hill Country circle');
    expect(String(calendar.getFirstPropertyValue('refresh-interval'))).toBe('PT60M'); // RFC 7986 5.7
  });

  it('puts every property of the calendar before its components (RFC 5545 3.6: icalbody = calprops component)', () => {
    const options = { name: 'Hill Country circle', zone: 'America/Phoenix', lookAgainMinutes: 60 };
    const published = publishedCalendar([{ ...entry(), attendee: null }], options);
    for (const text of [published, publishedCalendar([], options), calendarText('REQUEST', entry())]) {
      const lines = text.split('\r\n').filter((line) => line !== '' && !line.startsWith(' '));
      const depths: [number, string][] = [];
      let depth = 0;
      for (const line of lines) {
        if (line.startsWith('END:')) depth -= 1;
        depths.push([depth, line]);
        if (line.startsWith('BEGIN:')) depth += 1;
      }
      const outer = depths.filter(([at]) => at === 1).map(([, line]) => line);
      const firstComponent = outer.findIndex((line) => line.startsWith('BEGIN:'));
      expect(outer.slice(firstComponent).filter((line) => !/^(BEGIN|END):/.test(line))).toEqual([]);
    }
  });
});

describe('Names that would do harm, through the whole way', () => {
  let mail: MailSite;
  const evil = '<script>alert(1)</script>, "Bo"; Büyer 東';
  beforeEach(async () => {
    mail = await createMailSite();
    const { ids, db } = mail.site;
    await db('people')
      .where({ id: ids.buyer })
      .update({ name: `${evil}\r\nBcc: thief@example.org` });
    await db('people')
      .where({ id: ids.breeder })
      .update({ business_name: 'Boas & <b>Co</b>\r\nX-Forged: yes' });
    const parcel = await addParcel(mail.site, {
      code: 'TD-1',
      breederId: ids.breeder,
      buyerId: ids.buyer,
      holdCounterId: ids.phoenixCounter,
      shipDate: '2026-12-08',
    });
    const runId = await addRun(mail.site, {
      date: '2026-12-08',
      departAt: '2026-12-08T14:30:00.000Z',
      arriveAt: '2026-12-08T18:00:00.000Z',
      cutOffAt: '2026-12-08T23:00:00.000Z',
      stops: [
        {
          breederId: ids.breeder,
          arriveAt: '2026-12-08T16:30:00.000Z',
          leaveAt: '2026-12-08T16:40:00.000Z',
          parcelIds: [parcel],
        },
      ],
    });
    await mail.site.deps.services.notices.tell({ kind: 'parcel-created', parcelId: parcel });
    await mail.site.deps.services.notices.tell({ kind: 'run-confirmed', runId });
  });
  afterEach(() => mail.close());

  it('forges no header and no recipient', async () => {
    const mails = await mail.receive();
    expect(mails).toHaveLength(4);
    for (const { to, raw, parsed } of mails) {
      expect(to).toHaveLength(1);
      expect(to).not.toContain('thief@example.org');
      const head = raw.slice(0, raw.indexOf('\r\n\r\n'));
      expect(head).not.toMatch(/^(bcc|x-forged)/im);
      expect(parsed.headers.get('bcc')).toBeUndefined();
      expect(parsed.subject).not.toMatch(/[\r\n]/);
    }
  });

  it('is text in the HTML, never markup', async () => {
    for (const { parsed } of await mail.receive()) {
      expect(parsed.html).not.toMatch(/<script|<b>Co/i);
      expect(parsed.text).not.toContain('&lt;');
    }
  });

  it('is the name of the one attendee, without quotes and line breaks', async () => {
    const mails = (await mail.receive()).filter(({ invitation }) => invitation);
    const { vevent } = invitationTo(mails, 'buyer@example.org');
    expect(vevent.getAllProperties('attendee')).toHaveLength(1);
    expect(vevent.getFirstProperty('attendee')?.getParameter('cn')).toMatch(
      /^<script>alert\(1\)<\/script>, .Bo.; Büyer 東 Bcc: thief@example\.org$/,
    );
    expect(onlyMailTo(mails, 'buyer@example.org').parsed.html).toContain('Boas &amp; &lt;b&gt;Co&lt;/b&gt;');
  });
});
