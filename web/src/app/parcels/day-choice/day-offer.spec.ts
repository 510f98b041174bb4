import { Settings } from 'luxon';
import type { DayVerdict, Verdict } from '@shared/contract';
import { sampleDay } from '../parcel-samples';
import { dayOffer } from './day-offer';

const day = (date: string, verdict: Verdict): DayVerdict => sampleDay({ date, verdict });
const draft = { state: 'draft', shipDate: null } as const;
const booked = { state: 'booked', shipDate: '2026-12-08' } as const;

beforeEach(() => {
  Settings.defaultLocale = 'en-US';
  Settings.now = () => Date.UTC(2026, 11, 1, 12);
});

describe('what a chosen day offers', () => {
  it('is booking, without more ado on an open day', () => {
    expect(dayOffer(draft, day('2026-12-08', 'open'), '2026-12-01')).toMatchObject({
      kind: 'book',
      label: 'Book Tue, Dec 8',
      needsWords: false,
    });
  });

  it.each(['tight', 'far'] as const)('is booking with an acceptance in words on a %s day', (verdict) => {
    const offer = dayOffer(draft, day('2026-12-08', verdict), '2026-12-01');
    expect(offer).toMatchObject({ kind: 'book', needsWords: true });
    expect(offer.why).toContain('in your own words');
  });

  it('is nothing on a shut day', () => {
    expect(dayOffer(draft, day('2026-12-06', 'shut'), '2026-12-01')).toMatchObject({
      kind: 'none',
      label: 'Sun, Dec 6 is shut',
    });
  });

  it('is packing on the day it is booked for, whatever has become of that day', () => {
    expect(dayOffer(booked, day('2026-12-08', 'shut'), '2026-12-01').kind).toBe('pack');
  });

  it('is moving on another day', () => {
    expect(dayOffer(booked, day('2026-12-09', 'open'), '2026-12-01').label).toBe('Move to Wed, Dec 9');
  });

  it.each([
    ['2026-12-06', false],
    ['2026-12-07', true],
    ['2026-12-08', true],
  ])('on %s is pressing packing: %s, when it ships on the 8th', (today, isNext) => {
    expect(dayOffer(booked, day('2026-12-08', 'open'), today)).toMatchObject({ kind: 'pack', isNext });
  });
});
