import geodesic from 'geographiclib-geodesic';
import { aloneTrip } from '@shared/pooling/cost';
import { drivingMinutes, estimateLeg, haversineKm } from '@shared/pooling/travel';
import { seeded } from '../support/pooling-cases';

/** The ellipsoid's own distance, km: GeographicLib (C. F. F. Karney, J. Geodesy 87, 2013), WGS 84. */
const geodesicKm = (a: { lat: number; lon: number }, b: { lat: number; lon: number }): number =>
  (geodesic.Geodesic.WGS84.Inverse(a.lat, a.lon, b.lat, b.lon).s12 ?? NaN) / 1000;

describe('the straight line', () => {
  it('from Wellington to Salamanca is within 0.6 % of the 19 959.679 km that GeographicLib publishes', () => {
    const km = haversineKm({ lat: -41.32, lon: 174.81 }, { lat: 40.96, lon: -5.5 });
    expect(Math.abs(km / 19_959.679267 - 1)).toBeLessThan(0.006);
  });

  it('is within 0.6 % of the geodesic anywhere in and round Texas', () => {
    const random = seeded(7);
    for (let count = 0; count < 500; count++) {
      const a = { lat: 26 + 10 * random(), lon: -106 + 12 * random() };
      const b = { lat: 26 + 10 * random(), lon: -106 + 12 * random() };
      expect(Math.abs(haversineKm(a, b) / geodesicKm(a, b) - 1)).toBeLessThan(0.006);
    }
  });

  it('is nothing from a place to itself, and the same both ways', () => {
    const boerne = { lat: 29.79, lon: -98.73 };
    const seguin = { lat: 29.57, lon: -97.96 };
    expect(haversineKm(boerne, boerne)).toBe(0);
    expect(haversineKm(boerne, seguin)).toBe(haversineKm(seguin, boerne));
  });
});

describe('a leg on the road', () => {
  it('takes as long as its miles at street, county and highway speed, by hand', () => {
    // 5 miles at 25 mph: 12 min. 20 miles: 12 + 15/42 h = 12 + 21.43 → 34. 80 miles: 33.43 + 60 → 94.
    expect(drivingMinutes(0)).toBe(0);
    expect(drivingMinutes(5)).toBe(12);
    expect(drivingMinutes(20)).toBe(34);
    expect(drivingMinutes(80)).toBe(94);
  });

  it('is the straight line times the circuity, in miles of 1.609344 km', () => {
    const a = { lat: 29.42, lon: -98.49 };
    const b = { lat: 30.27, lon: -97.74 };
    const leg = estimateLeg(a, b, 1.3);
    expect(Math.abs(leg.miles / ((geodesicKm(a, b) * 1.3) / 1.609344) - 1)).toBeLessThan(0.006);
    expect(leg.minutes).toBe(drivingMinutes(leg.miles));
  });

  it('is never longer than a way round by a third place, in minutes or in miles', () => {
    const random = seeded(11);
    const place = () => ({ lat: 29 + random(), lon: -99 + 1.5 * random() });
    for (let count = 0; count < 500; count++) {
      const [a, b, c] = [place(), place(), place()];
      const straight = estimateLeg(a, c, 1.3);
      const round = [estimateLeg(a, b, 1.3), estimateLeg(b, c, 1.3)] as const;
      expect(straight.minutes).toBeLessThanOrEqual(round[0].minutes + round[1].minutes);
      expect(straight.miles).toBeLessThanOrEqual(round[0].miles + round[1].miles + 1e-9);
    }
  });
});

describe('driving alone', () => {
  it('is there and back at the IRS rate of 2026, 72.5 cents a mile, and the minutes', () => {
    const breeder = { lat: 29.42, lon: -98.49 };
    const counter = { lat: 29.53, lon: -98.47 };
    const costs = {
      runFixedCents: 1200,
      driverMinuteCents: 25,
      unplacedCents: 50_000,
      cutOffSlackMinutes: 30,
      circuity: 1.3,
    };
    const trip = aloneTrip(breeder, counter, costs, 72.5);
    // About 12.4 km straight, 10 road miles; 5 at 25 mph and 5 at 42 mph: 12 + 7.1, so 20 min each way.
    expect(trip.miles).toBeCloseTo((2 * 1.3 * geodesicKm(breeder, counter)) / 1.609344, 0);
    expect(trip.minutes).toBe(40);
    expect(trip.cents).toBe(Math.round(trip.miles * 72.5 + 40 * 25));
  });
});
