import { addParcel, addRun, changeRun, type RunRow } from '../support/run-rows';
import {
  createMailSite,
  instantOf,
  invitationTo,
  onlyMailTo,
  textOf,
  type MailSite,
  type ReceivedInvitation,
} from '../support/mail-site';

/**
 * The mails as they come over a real SMTP connection, taken apart by `mailparser` and read by `ical.js` (neither is used
 * to write them), held to RFC 5545 (iCalendar), RFC 5546 (iTIP) and RFC 6047 (iMIP); the section stands beside each check.
 * Sections marked "from memory" were not at hand.
 */
const bea = 'breeder@example.org';
const otto = 'other@example.org';
const cora = 'coordinator@example.org';
const bo = 'buyer@example.org';
const uma = 'unrelated@example.org';

/** A URI's scheme is the same in capitals (RFC 3986 3.1). */
const attendees = (vevent: ReceivedInvitation['vevent']): string[] =>
  vevent.getAllProperties('attendee').map((one) => String(one.getFirstValue()).toLowerCase());

describe('The conversation about a run', () => {
  let mail: MailSite;
  let parcels: { bea: number; otto: number };
  let runId: number;
  beforeEach(async () => {
    mail = await createMailSite();
    const { ids } = mail.site;
    const shipDate = '2026-12-08';
    parcels = {
      bea: await addParcel(mail.site, {
        code: 'TD-1',
        breederId: ids.breeder,
        buyerId: ids.buyer,
        holdCounterId: ids.phoenixCounter,
        shipDate,
      }),
      otto: await addParcel(mail.site, {
        code: 'CF-1',
        breederId: ids.otherBreeder,
        buyerId: ids.otherBuyer,
        holdCounterId: ids.denverCounter,
        shipDate,
      }),
    };
    runId = await addRun(mail.site, plan());
  });
  afterEach(() => mail.close());

  /** Tuesday 8 December 2026 in San Antonio (UTC−6): leave 08:30, Otto 09:30, Bea at the hour given, counter 12:00. */
  function plan(options: { beaAt?: string; withOtto?: boolean } = {}): RunRow {
    const { beaAt = '2026-12-08T16:30:00.000Z', withOtto = true } = options;
    const leave = (at: string) => new Date(Date.parse(at) + 10 * 60_000).toISOString();
    const ottoAt = '2026-12-08T15:30:00.000Z';
    const { otherBreeder, breeder } = mail.site.ids;
    return {
      date: '2026-12-08',
      departAt: '2026-12-08T14:30:00.000Z',
      arriveAt: '2026-12-08T18:00:00.000Z',
      cutOffAt: '2026-12-08T23:00:00.000Z',
      stops: [
        ...(withOtto
          ? [{ breederId: otherBreeder, arriveAt: ottoAt, leaveAt: leave(ottoAt), parcelIds: [parcels.otto] }]
          : []),
        { breederId: breeder, arriveAt: beaAt, leaveAt: leave(beaAt), parcelIds: [parcels.bea] },
      ],
    };
  }

  const confirmed = async () => {
    await mail.site.deps.services.notices.tell({ kind: 'run-confirmed', runId });
    return mail.receive();
  };
  const changed = async (row: RunRow, removedParcelIds: number[] = []) => {
    mail.site.setNow('2026-12-02T15:00:00.000Z');
    await changeRun(mail.site, runId, row);
    const event = {
      kind: 'run-changed',
      runId,
      removedParcelIds,
      addedParcelIds: [],
      why: 'Bea asked.',
    } as const;
    await mail.site.deps.services.notices.tell(event);
    return mail.receive();
  };

  it('invites the driver, both breeders and both buyers, each to their own event', async () => {
    const mails = await confirmed();
    expect(mails.flatMap(({ to }) => to).sort()).toEqual([bea, bo, cora, otto, uma]);
    const all = [bea, bo, cora, otto, uma].map((to) => invitationTo(mails, to));
    expect(new Set(all.map(({ event }) => event.uid)).size).toBe(5);
  });

  it('writes a REQUEST with all that RFC 5546 3.2.2 asks for', async () => {
    const mails = await confirmed();
    for (const to of [bea, bo, cora, otto, uma]) {
      const { calendar, vevent, event } = invitationTo(mails, to);
      expect(textOf(calendar, 'version')).toBe('2.0'); // RFC 5545 3.7.4
      expect(textOf(calendar, 'prodid')).not.toBe(''); // RFC 5545 3.7.3
      expect(textOf(calendar, 'method')).toBe('REQUEST');
      expect(calendar.getAllSubcomponents('vevent')).toHaveLength(1);
      // RFC 5546 3.2.2: ORGANIZER 1, DTSTAMP 1, DTSTART 1, SUMMARY 1, UID 1, ATTENDEE 1+; STATUS TENTATIVE or CONFIRMED.
      for (const name of ['organizer', 'dtstamp', 'dtstart', 'summary', 'uid', 'dtend', 'sequence'])
        expect(vevent.getAllProperties(name)).toHaveLength(1);
      expect(textOf(vevent, 'organizer')).toBe('mailto:circle@example.org');
      expect(attendees(vevent)).toEqual([`mailto:${to}`]);
      expect(vevent.getFirstProperty('attendee')?.getParameter('rsvp')).toBe('TRUE'); // RFC 5545 3.2.17
      expect(textOf(vevent, 'status')).toBe('CONFIRMED');
      expect(event.sequence).toBe(0);
      // RFC 5545 3.8.7.2: with a METHOD, DTSTAMP is when the message was made, in UTC.
      expect(textOf(vevent, 'dtstamp')).toBe('2026-12-01T12:00:00Z');
      // RFC 5545 3.8.2.2: DTEND is later than DTSTART.
      expect(event.endDate.compare(event.startDate)).toBe(1);
    }
  });

  it('names the method in the MIME part as in the body, in UTF-8, beside text and HTML (RFC 6047 2.4, IANA text/calendar)', async () => {
    const mails = await confirmed();
    const { mime, calendar } = invitationTo(mails, bo);
    expect(mime.value).toBe('text/calendar');
    expect(mime.params['method']).toBe(textOf(calendar, 'method'));
    expect(mime.params['charset']?.toLowerCase()).toBe('utf-8');
    const { parsed, raw } = onlyMailTo(mails, bo);
    expect(raw).toMatch(/Content-Type: multipart\/alternative/); // RFC 2046 5.1.4, the calendar as the last alternative
    expect(raw.lastIndexOf('text/calendar')).toBeGreaterThan(raw.lastIndexOf('text/html'));
    expect(parsed.text).toContain('Phoenix counter');
    expect(parsed.html).toContain('Phoenix counter');
    expect(parsed.headers.get('auto-submitted')).toBe('auto-generated'); // RFC 3834 5
  });

  it('tells each their own times on the clock of the place', async () => {
    const mails = await confirmed();
    const span = ({ event }: ReceivedInvitation) => [
      instantOf(event.startDate),
      instantOf(event.endDate),
      event.startDate.zone?.tzid,
    ];
    expect(span(invitationTo(mails, cora))).toEqual([
      '2026-12-08T14:30:00.000Z',
      '2026-12-08T18:00:00.000Z',
      'America/Chicago',
    ]);
    expect(span(invitationTo(mails, bea))).toEqual([
      '2026-12-08T16:30:00.000Z',
      '2026-12-08T16:40:00.000Z',
      'America/Chicago',
    ]);
    // Ready at 09:00 on the counter's own clock: Phoenix is UTC−7 all year, Denver UTC−7 in December.
    expect(span(invitationTo(mails, bo))).toEqual([
      '2026-12-09T16:00:00.000Z',
      '2026-12-09T18:00:00.000Z',
      'America/Phoenix',
    ]);
    expect(span(invitationTo(mails, uma))[2]).toBe('America/Denver');
  });

  it('keeps the others’ business out of it', async () => {
    const mails = await confirmed();
    for (const to of [bea, bo]) {
      const { raw, parsed } = onlyMailTo(mails, to);
      for (const secret of ['Otto', 'Cypress', 'CF-1', 'Uma', otto, uma])
        expect(`${raw}${parsed.text}`).not.toContain(secret);
    }
    expect(onlyMailTo(mails, bo).raw).not.toContain(bea);
  });

  it('says the same thing once, however often it is told', async () => {
    await mail.site.deps.services.notices.tell({ kind: 'run-confirmed', runId });
    await mail.site.deps.services.notices.tell({ kind: 'run-confirmed', runId });
    expect(await mail.receive()).toHaveLength(5);
    await mail.site.deps.services.notices.tell({ kind: 'run-confirmed', runId });
    expect(await mail.receive()).toEqual([]);
  });

  it('a change keeps the UID, raises SEQUENCE (RFC 5546 2.1.4, from memory) and goes to nobody whose plan stays', async () => {
    const before = await confirmed();
    const after = await changed(plan({ beaAt: '2026-12-08T17:00:00.000Z' }));
    expect(after.flatMap(({ to }) => to).sort()).toEqual([bea, cora]);
    for (const to of [bea, cora]) {
      const [first, second] = [invitationTo(before, to), invitationTo(after, to)];
      expect(textOf(second.calendar, 'method')).toBe('REQUEST');
      expect(second.event.uid).toBe(first.event.uid);
      expect(second.event.sequence).toBe(1);
      expect(textOf(second.vevent, 'dtstamp')).toBe('2026-12-02T15:00:00Z');
    }
    expect(instantOf(invitationTo(after, bea).event.startDate)).toBe('2026-12-08T17:00:00.000Z');
    expect(onlyMailTo(after, bea).parsed.text).toContain('Bea asked.');
  });

  it('one who leaves gets a CANCEL as RFC 5546 3.2.5 asks for it; the others who are concerned a REQUEST', async () => {
    const before = await confirmed();
    const after = await changed(plan({ withOtto: false }), [parcels.otto]);
    expect(after.flatMap(({ to }) => to).sort()).toEqual([cora, otto, uma]);
    for (const to of [otto, uma]) {
      const { calendar, vevent, event, mime } = invitationTo(after, to);
      expect(textOf(calendar, 'method')).toBe('CANCEL');
      expect(mime.params['method']).toBe('CANCEL'); // RFC 6047 2.4
      expect(event.uid).toBe(invitationTo(before, to).event.uid);
      expect(event.sequence).toBe(1);
      expect(textOf(vevent, 'status')).toBe('CANCELLED');
      expect(textOf(vevent, 'organizer')).toBe('mailto:circle@example.org');
      expect(attendees(vevent)).toEqual([`mailto:${to}`]);
      expect(vevent.getAllProperties('dtstamp')).toHaveLength(1);
      expect(vevent.getAllSubcomponents('valarm')).toEqual([]);
    }
    expect(textOf(invitationTo(after, cora).calendar, 'method')).toBe('REQUEST');
  });

  it('a run that is called off leaves every calendar, with the sequence risen each time', async () => {
    await confirmed();
    await changed(plan({ beaAt: '2026-12-08T17:00:00.000Z' }));
    await changed(plan({ withOtto: false, beaAt: '2026-12-08T17:00:00.000Z' }), [parcels.otto]);
    const off = {
      kind: 'run-called-off',
      runId,
      parcelIds: [parcels.bea],
      reason: 'Ice on the roads.',
    } as const;
    await mail.site.deps.services.notices.tell(off);
    const mails = await mail.receive();
    expect(mails.flatMap(({ to }) => to).sort()).toEqual([bea, bo, cora]);
    const sequences = Object.fromEntries(
      [bea, bo, cora].map((to) => {
        const { calendar, event } = invitationTo(mails, to);
        expect(textOf(calendar, 'method')).toBe('CANCEL');
        return [to, event.sequence];
      }),
    );
    // Bea: asked, moved, called off. Bo: asked, called off. Cora: asked, moved, lost a stop, called off.
    expect(sequences).toEqual({ [bea]: 2, [bo]: 1, [cora]: 3 });
    expect(onlyMailTo(mails, bea).parsed.text).toContain('Ice on the roads.');
    await mail.site.deps.services.notices.tell(off);
    expect(await mail.receive()).toEqual([]);
  });

  it('comes back under the UID it had, above the CANCEL (one UID for life, RFC 5545 3.8.4.7, from memory)', async () => {
    const before = await confirmed();
    await changed(plan({ withOtto: false }), [parcels.otto]);
    const again = await changed(plan());
    for (const to of [otto, uma]) {
      const { event, calendar } = invitationTo(again, to);
      expect(textOf(calendar, 'method')).toBe('REQUEST');
      expect(event.uid).toBe(invitationTo(before, to).event.uid);
      expect(event.sequence).toBe(2);
    }
    expect(again.map(({ to }) => to[0])).not.toContain(bo);
  });

  it('a UID holds no name, address or id of anybody (RFC 7986 5.3, from memory)', async () => {
    for (const { invitation } of await confirmed())
      expect(invitation?.event.uid).toMatch(/^[0-9a-f]{32}@127\.0\.0\.1$/);
  });
});
