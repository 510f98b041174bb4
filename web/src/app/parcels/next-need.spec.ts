import { Settings } from 'luxon';
import { groupByNeed, needOf, pressingText } from './next-need';
import { sampleParcel } from './parcel-samples';

const run = { id: 3, state: 'confirmed', date: '2026-12-08', coordinatorName: 'Lena Ortiz' };
const offItsDay = { shipDate: null, arrivalDate: null };

beforeEach(() => {
  Settings.defaultLocale = 'en-US';
  Settings.now = () => Date.UTC(2026, 11, 1, 12);
});

describe('the next thing a parcel needs', () => {
  it('is a day, for a draft', () => {
    expect(needOf(sampleParcel({ state: 'draft', ...offItsDay }), '2026-12-01')).toEqual({
      group: 'day',
      text: 'Choose a day, Dec 2 to Dec 19.',
    });
  });

  it('is a new day with the reason, after it was put on hold', () => {
    const held = sampleParcel({ state: 'on-hold', holdReason: 'Flagstaff falls to 31 °F', ...offItsDay });
    expect(needOf(held, '2026-12-01')).toEqual({
      group: 'day',
      text: 'Flagstaff falls to 31 °F. Choose a new day.',
    });
  });

  it.each([
    ['2026-12-06', 'waiting', 'Ships Tue, Dec 8. Lena Ortiz collects it.'],
    ['2026-12-07', 'pack', 'Pack it: it ships tomorrow. Lena Ortiz collects it.'],
    ['2026-12-08', 'pack', 'Pack it: it ships today. Lena Ortiz collects it.'],
    ['2026-12-09', 'pack', 'Pack it: it ships Tue, Dec 8, which is over. Lena Ortiz collects it.'],
  ])('on %s is %s, when it ships on the 8th', (today, group, text) => {
    expect(needOf(sampleParcel({ run }), today)).toEqual({ group, text });
  });

  it('says when no run takes it', () => {
    expect(needOf(sampleParcel(), '2026-12-01').text).toBe('Ships Tue, Dec 8. No run takes it yet.');
  });

  it('asks for the tracking number that was not written down', () => {
    const text = 'Planned at the Flagstaff counter Wed, Dec 9.';
    expect(needOf(sampleParcel({ state: 'handed-over', trackingNumber: 'LK1' }), '2026-12-08').text).toBe(
      text,
    );
    expect(needOf(sampleParcel({ state: 'handed-over' }), '2026-12-08').text).toBe(
      `${text} The tracking number is missing.`,
    );
  });

  it('passes on what the buyer reported', () => {
    const report = { outcome: 'not-arrived' as const, text: '', at: '2026-12-09T18:00:00.000Z' };
    expect(
      needOf(sampleParcel({ state: 'handed-over', trackingNumber: 'LK1', report }), '2026-12-09').text,
    ).toBe('Kenji Morrow reports that nothing has arrived.');
    const well = { ...report, outcome: 'arrived-well' as const };
    expect(needOf(sampleParcel({ state: 'arrived', report: well }), '2026-12-09').text).toBe(
      'Kenji Morrow reports that the animals arrived well. Close it when all is settled.',
    );
  });

  it('waits inside the span that was left open', () => {
    const open = sampleParcel({
      state: 'seeking',
      flexible: { from: '2026-12-03', to: '2026-12-11' },
      ...offItsDay,
    });
    expect(needOf(open, '2026-12-01')).toEqual({
      group: 'waiting',
      text: 'Waits for a safe day, Dec 3 to Dec 11.',
    });
  });
});

describe('the list', () => {
  const groups = groupByNeed(
    [
      sampleParcel({ id: 1, code: 'A', state: 'closed' }),
      sampleParcel({ id: 2, code: 'B', state: 'draft', latestDate: '2026-12-05', ...offItsDay }),
      sampleParcel({ id: 3, code: 'C', state: 'on-hold', ...offItsDay }),
      sampleParcel({ id: 4, code: 'D', shipDate: '2026-12-09' }),
      sampleParcel({ id: 5, code: 'E', shipDate: '2026-12-08' }),
      sampleParcel({ id: 6, code: 'F', shipDate: '2026-12-02' }),
    ],
    () => '2026-12-01',
  );
  const codes = groups.map((group) => [group.title, group.items.map((item) => item.parcel.code).join('')]);

  it('begins with what is most pressing, on hold before all, and ends with what is done', () => {
    expect(codes).toEqual([
      ['Needs a day', 'CB'],
      ['To pack', 'F'],
      ['Booked or waiting', 'ED'],
      ['Done', 'A'],
    ]);
  });

  it('says above it what presses', () => {
    expect(pressingText(groups)).toBe('2 need a day, 1 to pack.');
    expect(pressingText(groupByNeed([sampleParcel({ state: 'draft' })], () => '2026-12-01'))).toBe(
      '1 needs a day.',
    );
    expect(pressingText(groupByNeed([sampleParcel({ state: 'aboard' })], () => '2026-12-01'))).toBeNull();
  });

  it("goes by the date at each parcel's own drop-off counter", () => {
    const asked: string[] = [];
    groupByNeed([sampleParcel()], (zone) => {
      asked.push(zone);
      return '2026-12-01';
    });
    expect(asked).toEqual(['America/Chicago']);
  });
});
