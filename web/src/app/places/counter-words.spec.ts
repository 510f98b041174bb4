import type { Counter } from '@shared/contract';
import { cutOffText, foundCounters, hoursText } from './counter-words';

/** Intl writes a narrow space before AM and PM. */
const plain = (text: string): string => text.replaceAll('\u202f', ' ');

const counter = (over: Partial<Counter>): Counter => ({
  id: 1,
  carrierId: 1,
  name: 'Airport counter',
  street: '1 Mesa Road',
  city: 'Boise',
  state: 'ID',
  postalCode: '83705',
  lat: 43.6,
  lon: -116.2,
  zone: 'America/Boise',
  canDropOff: false,
  canHold: true,
  workingDays: [1, 2, 3, 4, 5],
  cutOffMinutes: {},
  openingHours: {},
  commitMinute: 540,
  active: true,
  version: 1,
  ...over,
});

describe('the week of a counter in words', () => {
  it('draws days with the same cut-off together', () => {
    const cutOffMinutes = { '1': 990, '2': 990, '3': 990, '4': 990, '5': 990, '6': 720 };
    expect(plain(cutOffText(counter({ cutOffMinutes })))).toBe('Mon–Fri 4:30 PM, Sat 12:00 PM');
  });
  it('has no cut-off where nothing is taken in', () => expect(cutOffText(counter({}))).toBe(''));
  it('tells opening hours', () => {
    const openingHours = { '1': { openMinute: 480, closeMinute: 1080 } };
    expect(plain(hoursText(counter({ openingHours })))).toBe('Mon 8:00 AM to 6:00 PM');
  });
});

describe('looking for a counter', () => {
  const all = [
    counter({ id: 1 }),
    counter({ id: 2, state: 'TX', city: 'San Antonio', postalCode: '78216', canDropOff: true }),
    counter({ id: 3, state: 'TX', city: 'Austin', active: false }),
  ];
  const ids = (search: Partial<Parameters<typeof foundCounters>[1]>) =>
    foundCounters(all, { text: '', state: '', does: 'all', ...search }).map(({ id }) => id);

  it('finds by words, ZIP code and state', () => {
    expect(ids({})).toEqual([1, 2, 3]);
    expect(ids({ text: ' boise ' })).toEqual([1]);
    expect(ids({ text: '7821' })).toEqual([2]);
    expect(ids({ state: 'TX' })).toEqual([2, 3]);
  });
  it('leaves those switched off out when one looks for what they do', () => {
    expect(ids({ does: 'hold' })).toEqual([1, 2]);
    expect(ids({ does: 'drop-off' })).toEqual([2]);
    expect(ids({ does: 'off' })).toEqual([3]);
  });
});
