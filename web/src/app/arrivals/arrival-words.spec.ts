import type { Arrival } from '@shared/contract';
import { canReport, headline } from './arrival-words';

const arrival = (changes: Partial<Arrival> = {}): Arrival => ({
  token: 'a-long-secret-of-the-link',
  code: 'HC-0008',
  what: '1 corn snake',
  breederName: 'Third Draw Serpents',
  breederPhone: '830-555-0103',
  buyerName: 'Noor Haddad',
  service: 'hold',
  status: 'planned',
  arrivalDate: '2026-12-09',
  collectFrom: '2026-12-09T16:00:00.000Z',
  collectBy: '2026-12-09T18:00:00.000Z',
  place: {
    name: 'Phoenix counter',
    street: '1 Ramp Road',
    city: 'Phoenix',
    state: 'AZ',
    postalCode: '85034',
    zone: 'America/Phoenix',
    hours: null,
  },
  bring: [],
  steps: [],
  mornings: [],
  trackingNumber: null,
  report: null,
  calendarUrl: '/api/arrivals/x/calendar.ics',
  ...changes,
});
const plain = (text: string) => text.replace(/\u202f/g, ' ');
const head = (changes: Partial<Arrival> = {}, viewer = 'America/Phoenix') =>
  headline(arrival(changes), viewer, 2026);

describe('the head of the buyer’s page', () => {
  it('has the day large, and the place with its own clock', () => {
    expect(head().lead).toBe('Your corn snake from Third Draw Serpents arrives');
    expect(head().large).toEqual(['Wednesday', 'December 9']);
    expect(plain(head().text)).toContain(
      'Collect it at the Phoenix counter from 9:00 AM. Please come before 11:00 AM',
    );
  });

  it('names the zone to somebody whose own clock shows another time', () => {
    expect(plain(head({}, 'America/New_York').text)).toContain('9:00 AM MST');
  });

  it('keeps the number of several animals', () => {
    expect(head({ what: '2 corn snakes' }).lead).toBe('Your 2 corn snakes from Third Draw Serpents arrive');
    expect(head({ what: '1 corn snake, 1 kingsnake' }).lead).toBe(
      'Your 1 corn snake, 1 kingsnake from Third Draw Serpents arrive',
    );
  });

  it.each([
    ['open', 'No day yet'],
    ['on-hold', 'On hold'],
    ['cancelled', 'Cancelled'],
    ['arrived', 'Arrived'],
  ] as const)('says plainly what %s is', (status, large) => {
    expect(head({ status, arrivalDate: null }).large).toEqual([large]);
  });
});

describe('the report', () => {
  const handedOver = { key: 'handed-over' as const, state: 'done' as const, text: '', at: null };

  it('is asked for once it was handed over, and once only, but for a parcel that has not come', () => {
    const can = (changes: Partial<Arrival>) => canReport(arrival(changes));
    expect(can({})).toBe(false);
    expect(can({ steps: [handedOver] })).toBe(true);
    expect(
      can({
        steps: [handedOver],
        report: { outcome: 'arrived-well', text: '', at: '2026-12-09T17:00:00.000Z' },
      }),
    ).toBe(false);
    expect(
      can({
        steps: [handedOver],
        report: { outcome: 'not-arrived', text: '', at: '2026-12-09T17:00:00.000Z' },
      }),
    ).toBe(true);
  });
});
