import type { DayVerdict, Reason, Verdict } from '../contract/days';
import type { BlackoutRule } from '../calendar/blackout-calendar';
import { federalHolidayRules } from '../calendar/federal-holiday-rules';
import { defaultPolicy } from '../policy/policy';
import type { DayQuestion } from './day-question';
import { dayVerdict, stripDays } from './day-verdict';
import { cornSnake, phoenix, sampleCounter, sampleForecast, sampleQuestion, texas } from './question-samples';

const ask = (changes: Parameters<typeof sampleQuestion>[0] = {}): DayVerdict =>
  dayVerdict(sampleQuestion(changes));
const codes = (day: DayVerdict, verdict: Verdict = day.verdict): string[] =>
  day.reasons.filter((reason) => reason.verdict === verdict).map((reason) => reason.code);
const blackout = (startDate: string, changes: Partial<BlackoutRule> = {}): BlackoutRule => ({
  title: 'Inventory day',
  kind: 'date',
  startDate,
  endDate: null,
  rules: null,
  liftedDates: [],
  scope: 'everywhere',
  carrierId: null,
  state: null,
  counterId: null,
  ...changes,
});
const holidays: BlackoutRule[] = federalHolidayRules.map(({ title, rules }) =>
  blackout('', { title, kind: 'yearly', startDate: null, rules }),
);

describe('the calendar', () => {
  it('opens a Wednesday in mild weather: it arrives on Thursday, with Friday behind it', () => {
    const day = ask({ shipDate: '2026-12-02' });
    expect(day).toMatchObject({ verdict: 'open', slackDays: 1, leadDays: 1 });
    // Ready at 9:00 in Phoenix, UTC−7 all year.
    expect(day.arrival).toEqual({
      at: '2026-12-03T16:00:00.000Z',
      place: 'Phoenix counter',
      zone: 'America/Phoenix',
    });
  });

  it('finds a Thursday tight: it arrives on Friday and a late parcel would wait until Monday', () => {
    const day = ask({ shipDate: '2026-12-03' });
    expect(day).toMatchObject({ verdict: 'tight', slackDays: 0 });
    expect(codes(day)).toEqual(['no-slack']);
    expect(day.reasons[0]?.text).toContain('until Monday, December 7');
  });

  it('shuts a Thursday for a circle that wants one slack day', () => {
    expect(ask({ shipDate: '2026-12-03', policy: { ...defaultPolicy, minSlackDays: 1 } }).verdict).toBe(
      'shut',
    );
  });

  it('shuts a Friday: the parcel would rest over the weekend', () => {
    const day = ask({ shipDate: '2026-12-04' });
    expect(codes(day)).toEqual(['arrival-closed']);
    expect(day.reasons[0]?.text).toContain('Saturday, December 5');
  });

  it('lets a Friday go to a counter that works on Saturdays, but without slack it stays tight', () => {
    const counter = sampleCounter(5, 'Houston', 'TX', 'America/Chicago', { workingDays: [1, 2, 3, 4, 5, 6] });
    expect(ask({ shipDate: '2026-12-04', destination: { kind: 'hold', counter } })).toMatchObject({
      verdict: 'tight',
      slackDays: 0,
    });
  });

  it.each(['2026-12-05', '2026-12-06'])('shuts %s, a weekend day without drop-off', (shipDate) => {
    expect(codes(ask({ shipDate }))).toContain('origin-closed');
  });

  it('shuts Thanksgiving and the day before it, and leaves the Monday before it open', () => {
    const now = '2026-11-22T12:00:00.000Z';
    const on = (shipDate: string) => ask({ now, shipDate, blackouts: holidays });
    // Thanksgiving 2026 is Thursday, November 26 (5 U.S.C. 6103: fourth Thursday).
    expect(codes(on('2026-11-26'))).toContain('origin-closed');
    expect(codes(on('2026-11-25'))).toEqual(['arrival-closed']);
    expect(on('2026-11-25').reasons[0]?.text).toContain('Thanksgiving Day');
    // Tuesday arrives on Wednesday, and the next day is the holiday.
    expect(on('2026-11-24')).toMatchObject({ verdict: 'tight', slackDays: 0 });
    expect(on('2026-11-23')).toMatchObject({ verdict: 'open', slackDays: 1 });
  });

  it.each([
    ['everywhere', {}, true],
    ['the carrier', { scope: 'carrier' as const, carrierId: 1 }, true],
    ['another carrier', { scope: 'carrier' as const, carrierId: 2 }, false],
    ['the state of the arrival', { scope: 'state' as const, state: 'AZ' }, true],
    ['another state', { scope: 'state' as const, state: 'CO' }, false],
    ['the hold counter', { scope: 'counter' as const, counterId: 2 }, true],
    ['another counter', { scope: 'counter' as const, counterId: 3 }, false],
  ])('holds a blackout on the arrival day to its scope: %s', (_name, scope, shuts) => {
    const day = ask({ shipDate: '2026-12-02', blackouts: [blackout('2026-12-03', scope)] });
    expect(day.verdict === 'shut').toBe(shuts);
  });

  it('knows that the cut-off has passed: 17:00 in Texas is 23:00 UTC in winter', () => {
    const at = (now: string) => codes(ask({ now, shipDate: '2026-12-01' }));
    expect(at('2026-12-01T22:59:00.000Z')).not.toContain('cut-off-passed');
    expect(at('2026-12-01T23:00:00.000Z')).toContain('cut-off-passed');
    expect(codes(ask({ shipDate: '2026-11-30' }))).toContain('past');
  });
});

describe('the parcel, its breeder and its buyer', () => {
  it.each<[string, Partial<DayQuestion>, Verdict, string]>([
    ['is not ready yet', { readyFrom: '2026-12-03' }, 'shut', 'not-ready'],
    ['is ready that very day', { readyFrom: '2026-12-02' }, 'open', 'slack'],
    ['is to be gone before', { latestDate: '2026-12-01' }, 'shut', 'too-late'],
    // Three days without food before travelling: common practice, no source.
    ['ate two days before', { lastMealDate: '2026-11-30' }, 'shut', 'fed-lately'],
    ['ate three days before', { lastMealDate: '2026-11-29' }, 'open', 'slack'],
    [
      'has a breeder who is away',
      { breederDaysAway: [{ from: '2026-12-01', to: '2026-12-02' }] },
      'shut',
      'breeder-away',
    ],
    [
      'has a buyer who cannot come that morning',
      { mornings: [{ date: '2026-12-03', suits: false }] },
      'shut',
      'buyer-away',
    ],
    [
      'has a buyer who named other mornings only',
      { mornings: [{ date: '2026-12-08', suits: true }] },
      'tight',
      'buyer-not-said',
    ],
    [
      'has a buyer who named this morning',
      { mornings: [{ date: '2026-12-03', suits: true }] },
      'open',
      'slack',
    ],
  ])('%s', (_name, changes, verdict, code) => {
    const day = ask(changes);
    expect(day.verdict).toBe(verdict);
    expect(codes(day)).toContain(code);
  });
});

/** One place's forecast at `tempF` for the night between ship day and arrival; mild otherwise. */
const night = (zone: string, tempF: number) =>
  sampleForecast(zone, '2026-12-01T12:00:00.000Z', 72, {
    at: (hour, usual) => (hour >= '2026-12-03T08' && hour < '2026-12-03T12' ? tempF : usual),
  });

/** An animal that endures everything, so that only the outdoor limits speak. */
const hardy = [
  {
    species: { ...cornSnake, bandLowF: -40, bandHighF: 150, enduranceLowF: -60, enduranceHighF: 170 },
    quantity: 1,
    massG: 160,
  },
];

describe('the guard rails (policy defaults; common practice from memory, no source)', () => {
  const mild = sampleQuestion().weather;
  const at = (place: 'origin' | 'destination' | 'hub', tempF: number, changes: Partial<DayQuestion> = {}) =>
    ask({
      contents: hardy,
      ...changes,
      weather: { ...mild, [place]: night(mild[place]?.zone ?? '', tempF) },
    });

  it('are 38 and 90 °F at either end: at the limit it is tight, a degree beyond it is shut', () => {
    for (const place of ['origin', 'destination'] as const) {
      expect(at(place, 38).verdict).toBe('tight');
      expect(codes(at(place, 37))).toEqual(['too-cold']);
      expect(at(place, 90).verdict).toBe('tight');
      expect(codes(at(place, 91))).toEqual(['too-hot']);
    }
  });

  it('leave a day open only with more room than a forecast is often wrong by: 3.8 °F a day ahead', () => {
    // RMSE 3.80 °F for 12-24 h highs: NOAA/NSSL verification tables.
    expect(at('destination', 41.7).verdict).toBe('tight');
    expect(at('destination', 41.9).verdict).toBe('open');
  });

  it('are stricter for a door: 40 and 85 °F', () => {
    const destination = {
      kind: 'door' as const,
      door: { name: 'the door', city: 'Phoenix', state: 'AZ', zone: 'America/Phoenix' },
    };
    expect(codes(at('destination', 39, { destination, service: 'door' }))).toContain('too-cold');
    expect(at('destination', 39).verdict).toBe('tight');
    expect(codes(at('destination', 86, { destination, service: 'door' }))).toContain('too-hot');
    expect(codes(at('destination', 86), 'shut')).toEqual([]);
  });

  it('count at the sort hub in the night only, and more widely', () => {
    expect(at('hub', 37).verdict).toBe('open');
    expect(codes(at('hub', 9))).toContain('too-cold');
    const noon = sampleForecast('America/Indiana/Indianapolis', '2026-12-01T12:00:00.000Z', 72, {
      at: (hour, usual) => (hour.startsWith('2026-12-02T17') ? 0 : usual),
    });
    expect(ask({ contents: hardy, weather: { ...mild, hub: noon } }).verdict).toBe('open');
  });

  it('are only tightened by a species’ own limits, never loosened', () => {
    const contents = (outdoorLowF: number | null) => [
      { species: { ...cornSnake, outdoorLowF }, quantity: 1, massG: 160 },
    ];
    expect(codes(at('destination', 49, { contents: contents(50) }))).toContain('too-cold');
    expect(at('destination', 49, { contents: contents(50) }).reasons[0]?.text).toContain('for a corn snake');
    expect(codes(at('destination', 37, { contents: contents(20) }))).toContain('too-cold');
  });

  it('say the numbers, the place, and the hour on its own clock', () => {
    // 08:00 UTC is 1 am in Phoenix.
    expect(at('destination', 31).reasons[0]?.text).toBe(
      'Phoenix falls to 31 °F at 1 am Thursday, 7 °F under the limit of 38 °F.',
    );
  });
});

describe('the forecast', () => {
  const mild = sampleQuestion().weather;
  const aged = (hours: number) => ({
    ...mild,
    hub: {
      ...sampleForecast('America/Indiana/Indianapolis', '2026-12-01T12:00:00.000Z', 72),
      issuedAt: new Date(Date.parse('2026-12-01T12:00:00.000Z') - hours * 3_600_000).toISOString(),
    },
  });

  it('makes no day open when it is more than 12 h old at any place of the route', () => {
    expect(ask({ weather: aged(12) }).verdict).toBe('open');
    const day = ask({ weather: aged(12.5) });
    expect(codes(day)).toEqual(['forecast-old']);
    expect(day.forecastAt).toBe('2026-11-30T23:30:00.000Z');
  });

  it.each(['origin', 'hub', 'destination'] as const)('shuts a near day that has none at the %s', (place) => {
    const day = ask({ weather: { ...mild, [place]: null } });
    expect(codes(day)).toEqual(['no-forecast']);
  });

  it('bridges a gap of three hours and no longer one', () => {
    const gap = (hours: readonly string[]) =>
      ask({
        weather: {
          ...mild,
          destination: sampleForecast('America/Phoenix', '2026-12-01T12:00:00.000Z', 72, {
            at: (hour, usual) => (hours.some((one) => hour.startsWith(one)) ? null : usual),
          }),
        },
      });
    const three = ['2026-12-03T08', '2026-12-03T09', '2026-12-03T10'];
    expect(gap(three).verdict).toBe('open');
    expect(gap([...three, '2026-12-03T11']).verdict).not.toBe('open');
  });

  it('calls a day beyond it far, if the calendar allows the day', () => {
    expect(ask({ shipDate: '2026-12-15' }).verdict).toBe('far');
    expect(ask({ shipDate: '2026-12-18' }).verdict).toBe('shut');
  });
});

describe('a weather alert', () => {
  const mild = sampleQuestion().weather;
  const alert = {
    id: 'a',
    event: 'Winter Storm Warning',
    severity: 'Severe',
    headline: '',
    from: '2026-12-02T12:00:00Z',
    to: '2026-12-03T18:00:00Z',
  };
  const withAlerts = (alerts: (typeof alert)[] | null) =>
    ask({
      weather: {
        ...mild,
        destination: sampleForecast('America/Phoenix', '2026-12-01T12:00:00.000Z', 72, { alerts }),
      },
    });

  it('shuts the day when its event is on the list, in whatever case, and it is in force where the parcel is', () => {
    expect(codes(withAlerts([alert]))).toEqual(['alert']);
    expect(codes(withAlerts([{ ...alert, event: 'WINTER STORM WARNING' }]))).toEqual(['alert']);
    expect(withAlerts([{ ...alert, event: 'Wind Advisory' }]).verdict).toBe('open');
    expect(withAlerts([{ ...alert, from: '2026-12-05T00:00:00Z', to: '2026-12-06T00:00:00Z' }]).verdict).toBe(
      'open',
    );
  });

  it('leaves no day open while nobody knows whether there is one', () => {
    expect(codes(withAlerts(null))).toEqual(['alerts-unknown']);
  });
});

describe('the strip', () => {
  it('is fourteen days in order, each judged as if it were asked for alone', () => {
    const question = sampleQuestion();
    const strip = stripDays(question, '2026-12-01', 14);
    expect(strip.map(({ date }) => date)).toEqual(
      Array.from({ length: 14 }, (_, index) => `2026-12-${String(index + 1).padStart(2, '0')}`),
    );
    for (const day of strip) expect(day).toEqual(dayVerdict({ ...question, shipDate: day.date }));
  });

  it('names every place by the city: origin, hub and destination', () => {
    const cold = (zone: string) => sampleForecast(zone, '2026-12-01T12:00:00.000Z', 5);
    const day = ask({
      weather: {
        origin: cold(texas.zone),
        hub: cold('America/Indiana/Indianapolis'),
        destination: cold(phoenix.zone),
      },
    });
    const places = day.reasons
      .filter(({ code }: Reason) => code === 'too-cold')
      .map(({ values }: Reason) => values['place']);
    expect(places).toEqual(['San Antonio', 'Indianapolis', 'Phoenix']);
  });
});
