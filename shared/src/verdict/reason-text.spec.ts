import type { Reason } from '../contract/days';
import { dayVerdict } from './day-verdict';
import { sampleForecast, sampleQuestion } from './question-samples';
import { reasonCodes, reasonText } from './reason-text';

const cold = {
  place: 'Phoenix',
  zone: 'America/Phoenix',
  // 08:00 UTC is 1 am in Phoenix, and 2 am in Texas.
  at: '2026-12-03T08:00:00.000Z',
  lowF: 31,
  limitF: 38,
  byF: 7,
  sigmaF: 3.8,
  leadDays: 1,
  species: null,
};
const hot = { ...cold, highF: 93, limitF: 90, byF: 3 };
const inBox = {
  ...cold,
  chance: 0.97,
  tempF: 62.4,
  byF: 2.4,
  side: 'low',
  limitF: 60,
  lowF: 60,
  highF: 86,
  leg: 'linehaul-in',
  species: 'corn snake',
};
const packValues = { pack: 'none', belowF: 70, aboveF: 80, lowHighF: 75, highF: 77 };

/** Sentences by hand; each code at least once. */
const said: readonly [string, Reason['values'], string][] = [
  ['past', {}, 'That day is over.'],
  ['beyond-offer', { days: 60 }, 'Only the next 60 days are offered.'],
  [
    'origin-closed',
    { place: 'Airport counter', date: '2026-11-26', title: 'Thanksgiving Day' },
    'The Airport counter takes no drop-off on Thursday, November 26: Thanksgiving Day.',
  ],
  [
    'origin-closed',
    { place: 'Airport counter', date: '2026-12-05', title: null },
    'The Airport counter takes no drop-off on Saturday, December 5.',
  ],
  ['cut-off-passed', { place: 'Airport counter' }, 'The cut-off at the Airport counter has passed.'],
  [
    'arrival-closed',
    { place: 'Phoenix counter', date: '2026-12-05', title: null },
    'It would arrive on Saturday, December 5, when the Phoenix counter hands nothing out, and rest over a day off.',
  ],
  [
    'arrival-closed',
    { place: 'Phoenix counter', date: '2026-12-25', title: 'Christmas Day' },
    'It would arrive on Friday, December 25, when the Phoenix counter hands nothing out (Christmas Day), and rest over a day off.',
  ],
  [
    'no-slack',
    { place: 'Phoenix counter', days: 0, next: '2026-12-07' },
    'No working day follows the arrival at the Phoenix counter: a late parcel would wait over the days off until Monday, December 7.',
  ],
  [
    'no-slack',
    { place: 'Phoenix counter', days: 0, next: null },
    'No working day follows the arrival at the Phoenix counter: a late parcel would wait over the days off.',
  ],
  [
    'no-slack',
    { place: 'Phoenix counter', days: 1, next: '2026-12-04' },
    'Only one working day follows the arrival at the Phoenix counter; the circle keeps two.',
  ],
  ['slack', { days: 1 }, 'One working day follows the arrival as slack.'],
  ['slack', { days: 2 }, 'Two working days follow the arrival as slack.'],
  ['not-ready', { date: '2026-12-03' }, 'The parcel is ready from Thursday, December 3.'],
  ['too-late', { date: '2026-12-01' }, 'The latest day you gave is Tuesday, December 1.'],
  [
    'fed-lately',
    { days: 1, need: 3 },
    'The last meal was 1 day before; the circle keeps 3 days without food.',
  ],
  [
    'fed-lately',
    { days: 0, need: 1 },
    'The last meal was that same day; the circle keeps 1 day without food.',
  ],
  [
    'fed-lately',
    { days: -4, need: 3 },
    'The last meal was after that day; the circle keeps 3 days without food.',
  ],
  ['breeder-away', { date: '2026-12-02' }, 'You are away on Wednesday, December 2.'],
  ['buyer-away', { date: '2026-12-03' }, 'The buyer cannot collect on Thursday, December 3.'],
  [
    'buyer-not-said',
    { date: '2026-12-03' },
    'The buyer has named mornings that suit, and Thursday, December 3 is not among them.',
  ],
  ['too-cold', cold, 'Phoenix falls to 31 °F at 1 am Thursday, 7 °F under the limit of 38 °F.'],
  [
    'too-cold',
    { ...cold, byF: 0.84, lowF: 37.16, species: 'boa' },
    'Phoenix falls to 37 °F at 1 am Thursday, 0.8 °F under the limit of 38 °F for a boa.',
  ],
  ['too-hot', hot, 'Phoenix rises to 93 °F at 1 am Thursday, 3 °F over the limit of 90 °F.'],
  [
    'near-cold',
    { ...cold, lowF: 40, byF: 2 },
    'Phoenix falls to 40 °F at 1 am Thursday, only 2 °F above the limit of 38 °F; a forecast 1 day ahead is often 3.8 °F off.',
  ],
  [
    'near-hot',
    { ...hot, highF: 88, byF: 2, sigmaF: 3, leadDays: 0, species: 'boa' },
    'Phoenix rises to 88 °F at 1 am Thursday, only 2 °F below the limit of 90 °F for a boa; a forecast for today is often 3 °F off.',
  ],
  [
    'outdoors-fine',
    { lowF: 52, highF: 71.6, marginF: 14 },
    'Outdoors it stays between 52 °F and 72 °F along the route, at least 14 °F inside the limits.',
  ],
  [
    'alert',
    {
      event: 'Ice Storm Warning',
      place: 'Indianapolis',
      from: '2026-12-02T18:00:00Z',
      to: '2026-12-03T06:00:00Z',
      zone: 'America/Indiana/Indianapolis',
    },
    'Ice Storm Warning for Indianapolis until 1 am Thursday.',
  ],
  ['alerts-unknown', { place: 'Indianapolis' }, 'Weather alerts for Indianapolis could not be read.'],
  [
    'no-forecast',
    { place: 'Phoenix', date: '2026-12-03' },
    'There is no forecast for Phoenix on Thursday, December 3, so nobody can say that the day is safe.',
  ],
  [
    'forecast-old',
    { place: 'Phoenix', hours: 13.2, mostHours: 12 },
    'The forecast for Phoenix is 13 h old; only one of at most 12 h can make a day open.',
  ],
  [
    'forecast-far',
    { place: 'Phoenix', date: '2026-12-15' },
    'The forecast for Phoenix does not reach Tuesday, December 15 yet. The calendar is checked, the weather is not.',
  ],
  [
    'box',
    inBox,
    'In the box it falls to 62 °F on the way to Phoenix at 1 am Thursday, 2.4 °F above the limit of 60 °F for a corn snake; it keeps within 60 °F and 86 °F in 97 of 100 forecasts like this one.',
  ],
  [
    'box',
    { ...inBox, chance: 0.9999, side: 'high', tempF: 88, byF: -2, limitF: 86, leg: 'truck', species: null },
    'In the box it rises to 88 °F in the delivery truck in Phoenix at 1 am Thursday, 2 °F over the limit of 86 °F for the animal; it keeps within 60 °F and 86 °F in more than 99 of 100 forecasts like this one.',
  ],
  [
    'box-late',
    { ...inBox, chance: 0.001, tempF: 46, byF: -2, limitF: 48, lowF: 48, highF: 92, leg: 'late' },
    'If it is a day late, the box falls to 46 °F while it rests in Phoenix at 1 am Thursday, 2 °F under what a corn snake may endure (48 °F); it keeps within 48 °F and 92 °F in fewer than 1 of 100 forecasts like this one.',
  ],
  [
    'late-unknown',
    {},
    'The forecast does not reach a day further, so nobody can say how a late parcel would fare.',
  ],
  ['pack', packValues, 'No heat or cold pack is needed.'],
  ['pack', { ...packValues, lowHighF: 65 }, 'No heat pack: the box keeps better without one.'],
  [
    'pack',
    { ...packValues, pack: 'heat-72', lowHighF: 65 },
    'Use one 72-hour heat pack, not touching the animal: the high along the route falls under 70 °F.',
  ],
  [
    'pack',
    { ...packValues, pack: 'cold', highF: 84 },
    'Use a cold pack, not touching the animal: it rises to 84 °F along the route.',
  ],
  [
    'pack-short',
    { hours: 72, needHours: 75, longer: null },
    'A 72-hour heat pack is less than the 75 h planned with a day to spare.',
  ],
  [
    'pack-short',
    { hours: 40, needHours: 48, longer: 72 },
    'A 40-hour heat pack is less than the 48 h planned with a day to spare; use the 72-hour one.',
  ],
];

describe('a reason in words', () => {
  it.each(said)('%s %j', (code, values, sentence) => {
    expect(reasonText({ code, verdict: 'tight', values })).toBe(sentence);
  });

  it('is tried for every code there is', () => {
    expect([...new Set(said.map(([code]) => code))].toSorted()).toEqual([...reasonCodes].toSorted());
  });

  it('shows its name where it has no sentence, so that the fault is seen', () => {
    expect(reasonText({ code: 'moon', verdict: 'shut', values: {} })).toBe('moon');
  });
});

describe('the reasons that days really have', () => {
  const now = '2026-12-01T12:00:00.000Z';
  const at = (tempF: number, changes: Parameters<typeof sampleForecast>[3] = {}) => ({
    origin: sampleForecast('America/Chicago', now, tempF, changes),
    hub: sampleForecast('America/Chicago', now, tempF, changes),
    destination: sampleForecast('America/Phoenix', now, tempF, changes),
  });
  const alerts = [
    {
      id: 'a',
      event: 'Ice Storm Warning',
      severity: 'Severe',
      headline: '',
      from: now,
      to: '2026-12-08T00:00:00Z',
    },
  ];
  const { policy } = sampleQuestion();
  const questions: Parameters<typeof sampleQuestion>[0][] = [
    {},
    { shipDate: '2026-11-30' },
    { shipDate: '2027-03-01' },
    { shipDate: '2026-12-03' },
    { shipDate: '2026-12-05' },
    { shipDate: '2026-12-15' },
    { now: '2026-12-02T23:30:00.000Z' },
    { readyFrom: '2026-12-10', latestDate: '2026-12-01', lastMealDate: '2026-12-01' },
    {
      breederDaysAway: [{ from: '2026-12-02', to: '2026-12-02' }],
      mornings: [{ date: '2026-12-03', suits: false }],
    },
    { mornings: [{ date: '2026-12-08', suits: true }] },
    ...[-5, 39, 50, 76, 85, 89, 110].map((tempF) => ({ weather: at(tempF) })),
    { weather: at(72, { alerts }) },
    { weather: at(72, { alerts: null }) },
    { weather: at(72, { issuedAt: '2026-11-30T12:00:00.000Z' }) },
    { weather: { ...at(72), hub: null } },
    { weather: at(72, { at: (hour, usual) => (hour > '2026-12-04T08' ? null : usual) }) },
    { weather: at(50), policy: { ...policy, heatPackSpareHours: 60 } },
  ];
  const reasons = questions.flatMap((changes) => dayVerdict(sampleQuestion(changes)).reasons);

  it('are all of those that have a sentence, and no others', () => {
    expect([...new Set(reasons.map(({ code }) => code))].toSorted()).toEqual([...reasonCodes].toSorted());
  });

  it('are whole sentences without holes, and hold no number that is none', () => {
    for (const { text, values } of reasons) {
      expect(text).toMatch(/^[A-Z].*[A-Za-z0-9)]\.$/);
      expect(text).not.toMatch(/undefined|null|NaN|Infinity|Invalid| {2}/);
      for (const value of Object.values(values))
        if (typeof value === 'number') expect(Number.isFinite(value)).toBe(true);
    }
  });
});
