import { nextByClock, nextPlaces } from './next-stops';
import { sampleRun, sampleStop } from './run-samples';

const twoStops = sampleRun({
  state: 'confirmed',
  stops: [
    sampleStop(),
    sampleStop({ seq: 2, businessName: null, breederName: 'Otto', arriveAt: '2026-12-08T20:00:00.000Z' }),
  ],
});

describe('where the driver goes next', () => {
  it('leads over the stops to the counter while parcels are collected', () => {
    expect(nextPlaces(twoStops).map(({ title }) => title)).toEqual([
      'Third Draw Serpents',
      'Otto',
      'Airport counter',
    ]);
  });

  it('is the counter alone once everything is aboard', () => {
    expect(nextPlaces({ ...twoStops, state: 'underway' }).map(({ title }) => title)).toEqual([
      'Airport counter',
    ]);
  });

  it('gives the address, the phone and a link any map opens (RFC 5870)', () => {
    const [first] = nextPlaces(twoStops);
    expect(first).toMatchObject({
      address: '12 Cypress Rd, Boerne',
      phone: '210-555-0144',
      geo: 'geo:29.79,-98.73',
      text: 'Load 2 parcels',
    });
  });

  it('follows the clock, and stays at the counter when all times have passed', () => {
    const places = nextPlaces(twoStops);
    expect(nextByClock(places, Date.parse('2026-12-08T18:00:00Z'))).toBe(0);
    expect(nextByClock(places, Date.parse('2026-12-08T19:30:00Z'))).toBe(1);
    expect(nextByClock(places, Date.parse('2026-12-08T23:30:00Z'))).toBe(2);
  });
});
