import { defaultPolicy } from '../../policy/policy';
import { dayFacts } from '../day-facts';
import { sampleForecast, sampleQuestion } from '../question-samples';
import { alertCheck } from './alert-check';

const mild = sampleQuestion().weather;
type Place = keyof typeof mild;
const zoneOf = (place: Place) => mild[place]?.zone ?? '';
/** Shipped on Wednesday, December 2 from Texas (UTC−6), packed at noon; arriving on the 3rd in Phoenix (UTC−7). */
const warned = (
  place: Place,
  from: string,
  to: string,
  event = 'Ice Storm Warning',
  shutAlerts = defaultPolicy.shutAlerts,
) => {
  const alerts = [{ id: 'a', event, severity: 'Severe', headline: '', from, to }];
  const weather = {
    ...mild,
    [place]: sampleForecast(zoneOf(place), '2026-12-01T12:00:00.000Z', 72, { alerts }),
  };
  return (
    alertCheck(dayFacts(sampleQuestion({ weather, policy: { ...defaultPolicy, shutAlerts } }))).length > 0
  );
};

describe('an alert shuts a day', () => {
  it('for each of the events that the circle names, and for no other', () => {
    const at = (event: string, list?: string[]) =>
      warned('hub', '2026-12-03T00:00:00Z', '2026-12-03T06:00:00Z', event, list);
    for (const event of defaultPolicy.shutAlerts) expect(at(event)).toBe(true);
    expect(at('Dense Fog Advisory')).toBe(false);
    expect(at('Dense Fog Advisory', ['dense fog advisory'])).toBe(true);
  });

  it.each<[string, Place, string, string, boolean]>([
    ['ends as the parcel is packed', 'origin', '2026-12-02T10:00:00Z', '2026-12-02T18:00:00Z', false],
    ['lasts a minute longer', 'origin', '2026-12-02T10:00:00Z', '2026-12-02T18:01:00Z', true],
    [
      'begins when the parcel has left Texas at 20:00',
      'origin',
      '2026-12-03T02:00:00Z',
      '2026-12-03T09:00:00Z',
      false,
    ],
    ['meets the night at the sort hub', 'hub', '2026-12-03T05:00:00Z', '2026-12-03T06:00:00Z', true],
    ['meets the day at the sort hub', 'hub', '2026-12-02T12:00:00Z', '2026-12-02T20:00:00Z', false],
    ['ends before the arrival day', 'destination', '2026-12-02T08:00:00Z', '2026-12-03T07:00:00Z', false],
    ['meets the arrival day', 'destination', '2026-12-03T20:00:00Z', '2026-12-04T00:00:00Z', true],
    ['begins the day after', 'destination', '2026-12-04T07:00:00Z', '2026-12-04T12:00:00Z', false],
  ])('only while the parcel may be there: one that %s', (_when, place, from, to, shuts) => {
    expect(warned(place, from, to)).toBe(shuts);
  });
});
