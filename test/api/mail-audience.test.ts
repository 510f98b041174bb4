import type { NoticeEvent } from '@api/notices/notices-service';
import { addParcel, addRun } from '../support/run-rows';
import {
  createMailSite,
  instantOf,
  invitationTo,
  onlyMailTo,
  textOf,
  type MailSite,
} from '../support/mail-site';

/** Bea sells to Bo (Phoenix), Otto to Uma (Denver); Cora drives both parcels on Tuesday 8 December. */
const bea = 'breeder@example.org';
const otto = 'other@example.org';
const cora = 'coordinator@example.org';
const bo = 'buyer@example.org';
const uma = 'unrelated@example.org';

describe('Who hears of what', () => {
  let mail: MailSite;
  let parcelId: number;
  let ottosId: number;
  let runId: number;
  beforeEach(async () => {
    mail = await createMailSite();
    const { ids } = mail.site;
    const shipDate = '2026-12-08';
    const base = { shipDate, holdCounterId: ids.phoenixCounter };
    parcelId = await addParcel(mail.site, {
      ...base,
      code: 'TD-1',
      breederId: ids.breeder,
      buyerId: ids.buyer,
    });
    ottosId = await addParcel(mail.site, {
      ...base,
      holdCounterId: ids.denverCounter,
      code: 'CF-1',
      breederId: ids.otherBreeder,
      buyerId: ids.otherBuyer,
    });
    const stop = (breederId: number, hour: number, id: number) => ({
      breederId,
      arriveAt: `2026-12-08T${hour}:30:00.000Z`,
      leaveAt: `2026-12-08T${hour}:40:00.000Z`,
      parcelIds: [id],
    });
    runId = await addRun(mail.site, {
      date: shipDate,
      departAt: '2026-12-08T14:30:00.000Z',
      arriveAt: '2026-12-08T18:00:00.000Z',
      cutOffAt: '2026-12-08T23:00:00.000Z',
      stops: [stop(ids.breeder, 16, parcelId), stop(ids.otherBreeder, 15, ottosId)],
    });
  });
  afterEach(() => mail.close());

  const tell = async (event: NoticeEvent) => {
    await mail.site.deps.services.notices.tell(event);
    return mail.receive();
  };
  const arrivalFor = (code: string) => `http://127.0.0.1:4300/arrival/arrival-token-of-${code}`;

  /** Every kind of event, whom it concerns, and what must stand in each mail, in the text as in the HTML. */
  const cases: [string, () => NoticeEvent, Record<string, string[]>][] = [
    [
      'an invitation to the site',
      () => ({
        kind: 'account-link',
        personId: mail.site.ids.otherBreeder,
        link: 'invitation',
        url: 'http://127.0.0.1:4300/welcome/secret',
        expiresAt: '2026-12-04T18:00:00.000Z',
      }),
      {
        [otto]: [
          'http://127.0.0.1:4300/welcome/secret',
          'Friday, December 4',
          '12:00 PM',
          'Hill Country circle',
        ],
      },
    ],
    [
      'a forgotten password',
      () => ({
        kind: 'account-link',
        personId: mail.site.ids.buyer,
        link: 'reset',
        url: 'http://127.0.0.1:4300/welcome/secret',
        expiresAt: '2026-12-01T13:00:00.000Z',
      }),
      // Bo's clock is Phoenix, UTC−7.
      { [bo]: ['http://127.0.0.1:4300/welcome/secret', '6:00 AM on Tuesday, December 1'] },
    ],
    [
      'a new parcel',
      () => ({ kind: 'parcel-created', parcelId }),
      { [bo]: ['corn snake', 'Third Draw Serpents', 'TD-1', 'Phoenix, AZ', arrivalFor('TD-1')] },
    ],
    [
      'a booking',
      () => ({ kind: 'parcel-booked', parcelId }),
      {
        [bo]: [
          'Wednesday',
          'December 9',
          'TD-1',
          'between 9:00 AM and 11:00 AM, Phoenix time',
          arrivalFor('TD-1'),
        ],
      },
    ],
    [
      'a parcel put on hold',
      () => ({
        kind: 'parcel-on-hold',
        parcelId,
        reason: 'A low of 31 °F at the hub.',
        shipDate: '2026-12-08',
      }),
      {
        [bea]: ['A low of 31 °F at the hub.', 'Tuesday, December 8', 'TD-1', '/parcels/'],
        [bo]: ['Wednesday, December 9', 'nothing to collect', arrivalFor('TD-1')],
      },
    ],
    [
      'a cancelled parcel',
      () => ({ kind: 'parcel-cancelled', parcelId, shipDate: '2026-12-08' }),
      { [bo]: ['has been cancelled', 'TD-1', 'Third Draw Serpents'] },
    ],
    [
      'a confirmed run',
      () => ({ kind: 'run-confirmed', runId }),
      {
        [cora]: [
          'Tuesday, December 8',
          '8:30 AM',
          '10:30 AM',
          'Third Draw Serpents',
          'TD-1',
          'CF-1',
          '5:00 PM',
        ],
        [bea]: ['Tuesday, December 8', '10:30 AM', 'by 10:15 AM', 'Cora Coordinator', 'TD-1'],
        [otto]: ['9:30 AM', 'CF-1'],
        [bo]: [
          'December 9',
          '100 Ramp Road',
          'between 9:00 AM and 11:00 AM, Phoenix time',
          'photo ID',
          arrivalFor('TD-1'),
        ],
        [uma]: ['between 9:00 AM and 11:00 AM, Denver time'],
      },
    ],
    [
      'a handed-over run',
      () => ({ kind: 'run-handed-over', runId }),
      { [bo]: ['On the way', 'TD-1', 'LK 123'], [uma]: ['On the way', 'CF-1'] },
    ],
    [
      'a buyer’s mornings',
      () => ({ kind: 'mornings-said', parcelId }),
      { [bea]: ['Bo Buyer', 'Thursday, December 10', 'does not suit', 'TD-1'] },
    ],
    [
      'a buyer’s report',
      () => ({ kind: 'arrival-reported', parcelId }),
      { [bea]: ['Bo Buyer', 'Arrived, but weak', 'Cold to the touch, drinking.', 'TD-1'] },
    ],
  ];

  it.each(cases)('%s', async (_, event, concerned) => {
    const { db } = mail.site;
    await db('parcels').where({ id: parcelId }).update({
      tracking_number: 'LK 123',
      report_outcome: 'arrived-weak',
      report_text: 'Cold to the touch, drinking.',
      report_at: '2026-12-09T17:00:00.000Z',
    });
    await db('parcel_mornings').insert({ parcel_id: parcelId, date: '2026-12-10', suits: false });
    const mails = await tell(event());
    expect(mails.flatMap(({ to }) => to).sort()).toEqual(Object.keys(concerned).sort());
    for (const [to, facts] of Object.entries(concerned)) {
      const { text, html } = onlyMailTo(mails, to).parsed;
      // Tags out and references back: what a person reads in the HTML.
      const shown = String(html)
        .replace(/<style>.*?<\/style>/s, '')
        .replace(/<br>|&nbsp;/g, ' ')
        .replace(/<[^>]+>/g, '')
        .replace(/&#39;/g, "'");
      for (const fact of facts) {
        expect(text).toContain(fact);
        expect(shown).toContain(fact);
      }
    }
    expect(await tell(event())).toEqual([]);
  });

  it('tells everybody invited, and only them, when the run is called off', async () => {
    await tell({ kind: 'run-confirmed', runId });
    const mails = await tell({
      kind: 'run-called-off',
      runId,
      parcelIds: [parcelId, ottosId],
      reason: 'Ice.',
    });
    expect(mails.flatMap(({ to }) => to).sort()).toEqual([bea, bo, cora, otto, uma]);
    for (const to of [bea, cora]) expect(onlyMailTo(mails, to).parsed.text).toContain('Ice.');
    expect(onlyMailTo(mails, bo).parsed.text).toContain('Was to arrive: Wednesday, December 9');
  });

  it('a parcel put on hold leaves its run: one mail to the buyer takes the arrival back', async () => {
    await tell({ kind: 'run-confirmed', runId });
    await mail.site.deps.transaction((tx) =>
      tx.services.parcels.putOnHold(parcelId, 'Snow at the hub.', null),
    );
    const mails = await mail.receive();
    const buyers = onlyMailTo(mails, bo);
    expect(buyers.parsed.subject).toBe('The arrival date no longer stands');
    expect(textOf(invitationTo(mails, bo).calendar, 'method')).toBe('CANCEL');
    expect(buyers.invitation?.event.sequence).toBe(1);
    // Bea's collection leaves her calendar, and she hears what to do about the parcel.
    const hers = mails.filter(({ to }) => to.includes(bea));
    expect(hers.filter(({ invitation }) => invitation)).toHaveLength(1);
    expect(hers).toHaveLength(2);
    expect(mails.filter(({ to }) => to.includes(uma))).toEqual([]);
  });

  it('a parcel that moves to another day leaves its run: one mail moves the buyer’s event to the new date', async () => {
    const before = invitationTo(await tell({ kind: 'run-confirmed', runId }), bo);
    await mail.site.deps.transaction(async (tx) => {
      await tx.services.runs.takeOut(parcelId, 'TD-1 ships on another day now.', null);
      await tx
        .db('parcels')
        .where({ id: parcelId })
        .update({ ship_date: '2026-12-10' })
        .increment('version', 1);
      await tx.services.notices.tell({ kind: 'parcel-booked', parcelId });
    });
    const after = invitationTo(await mail.receive(), bo);
    expect(textOf(after.calendar, 'method')).toBe('REQUEST');
    expect(after.event.uid).toBe(before.event.uid);
    expect(after.event.sequence).toBeGreaterThan(before.event.sequence);
    expect(instantOf(after.event.startDate)).toBe('2026-12-11T16:00:00.000Z');
  });

  it('once a buyer knows that the arrival is off, a new booking invites with its run again', async () => {
    await tell({ kind: 'run-confirmed', runId });
    await tell({ kind: 'run-called-off', runId, parcelIds: [parcelId, ottosId], reason: 'Ice.' });
    await mail.site
      .db('parcels')
      .where({ id: parcelId })
      .update({ ship_date: '2026-12-10' })
      .increment('version', 1);
    const mails = await tell({ kind: 'parcel-booked', parcelId });
    expect(onlyMailTo(mails, bo).invitation).toBeNull();
  });

  it('a former buyer’s event is taken back when the parcel goes to somebody else', async () => {
    await tell({ kind: 'run-confirmed', runId });
    await mail.site.db('parcels').where({ id: parcelId }).update({ buyer_id: mail.site.ids.otherBuyer });
    const mails = await tell({ kind: 'parcel-created', parcelId });
    expect(textOf(invitationTo(mails, bo).calendar, 'method')).toBe('CANCEL');
    expect(onlyMailTo(mails, uma).invitation).toBeNull();
  });
});
