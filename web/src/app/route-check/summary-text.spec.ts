import { Settings } from 'luxon';
import type { DayVerdict, Verdict } from '@shared/contract';
import { countText, summaryText } from './summary-text';

const day = (date: string, verdict: Verdict): DayVerdict => ({
  date,
  verdict,
  chance: null,
  lateChance: null,
  slackDays: 1,
  pack: 'none',
  arrival: { at: '2026-12-09T16:00:00.000Z', place: 'Flagstaff counter', zone: 'America/Phoenix' },
  outdoor: null,
  inBox: null,
  reasons: [],
  leadDays: 1,
  forecastAt: null,
  run: null,
});
const route = {
  origin: 'San Antonio airport counter',
  hub: 'Larkspur sort hub',
  destination: 'Flagstaff counter',
  originZone: 'America/Chicago',
  destinationZone: 'America/Phoenix',
};
const week = [
  day('2026-12-07', 'tight'),
  day('2026-12-08', 'open'),
  day('2026-12-09', 'open'),
  day('2026-12-11', 'shut'),
  day('2026-12-14', 'far'),
];

beforeEach(() => {
  Settings.defaultLocale = 'en-US';
  Settings.now = () => Date.UTC(2026, 11, 1, 12);
});

describe('the text for the buyer', () => {
  const text = summaryText({ route, days: week }, { contents: '1 corn snake', service: 'hold' });

  it('says what goes where', () => {
    expect(text).toContain(
      '1 corn snake, held for pickup at the Flagstaff counter, from the San Antonio airport counter.',
    );
  });

  it('lists the days that can be offered, by verdict', () => {
    expect(text).toContain('Open days: Tue, Dec 8; Wed, Dec 9.');
    expect(text).toContain('Tight days (little room): Mon, Dec 7.');
    expect(text).toContain('Too far off for a forecast yet: Mon, Dec 14.');
    expect(text).toContain('The other 1 of the 5 days are not offered.');
  });

  it('names the pack and the chance of the first day that is offered', () => {
    const sure = { ...day('2026-12-08', 'open'), pack: 'heat-40' as const, chance: 0.971 };
    const head = { contents: '1 corn snake', service: 'hold' } as const;
    const early = { ...day('2026-12-07', 'tight'), chance: 0.85 };
    const line =
      'On Tue, Dec 8 it travels with a 40-hour heat pack: safe in 97 of 100 forecasts like this one.';
    expect(summaryText({ route, days: [early, sure] }, head)).toContain(line);
    expect(summaryText({ route, days: [early] }, head)).toContain(
      'On Mon, Dec 7 it travels with no pack: safe in 85 of 100',
    );
    expect(text).not.toContain('travels with');
  });

  it('leaves the last word to others', () => {
    expect(text).toContain("carrier's terms, local law and a veterinarian come first");
  });

  it('does not promise a day when none is offered', () => {
    const none = summaryText(
      { route, days: [day('2026-12-11', 'shut')] },
      { contents: '1 boa', service: 'hold' },
    );
    expect(none).toContain('None of these days is offered.');
    expect(none).not.toContain('Open days');
  });
});

describe('the days in a sentence', () => {
  it.each([
    [week, '2 open, 1 tight, 1 shut, and 1 far. The first open day is Tuesday, December 8.'],
    [
      [day('2026-12-07', 'tight'), day('2026-12-11', 'shut')],
      '1 tight and 1 shut. No day is open; the first tight one is Monday, December 7.',
    ],
    [[day('2026-12-11', 'shut')], '1 shut. None of them can be offered yet.'],
  ])('counts them', (days, expected) => {
    expect(countText(days)).toBe(expected);
  });
});
