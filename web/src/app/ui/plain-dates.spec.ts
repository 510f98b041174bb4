import {
  addDays,
  addMonths,
  dateIn,
  datesBetween,
  endOfMonth,
  isoWeekday,
  longDate,
  startOfWeek,
} from './plain-dates';

// Expected days from a printed calendar of 2026 to 2028.
describe('plain dates', () => {
  it('steps over the end of a month, a year and both clock changes', () => {
    expect(addDays('2026-12-31', 1)).toBe('2027-01-01');
    expect(addDays('2026-03-07', 1)).toBe('2026-03-08');
    expect(addDays('2026-03-08', 1)).toBe('2026-03-09');
    expect(addDays('2026-11-01', 1)).toBe('2026-11-02');
    expect(addDays('2027-01-01', -1)).toBe('2026-12-31');
  });

  it('knows leap years and month ends', () => {
    expect(endOfMonth('2028-02')).toBe('2028-02-29');
    expect(endOfMonth('2027-02')).toBe('2027-02-28');
    expect(addMonths('2026-12', 1)).toBe('2027-01');
    expect(addMonths('2026-01', -1)).toBe('2025-12');
  });

  it('counts weekdays from Monday and weeks from Sunday', () => {
    expect(isoWeekday('2026-12-08')).toBe(2);
    expect(isoWeekday('2026-12-06')).toBe(7);
    expect(startOfWeek('2026-12-08')).toBe('2026-12-06');
    expect(startOfWeek('2026-12-06')).toBe('2026-12-06');
  });

  it('counts both ends of a span', () => {
    expect(datesBetween('2026-12-30', '2027-01-01')).toEqual(['2026-12-30', '2026-12-31', '2027-01-01']);
    expect(datesBetween('2026-12-30', '2026-12-29')).toEqual([]);
  });

  it('takes the date of the place, not of the reader', () => {
    expect(dateIn('Pacific/Honolulu', new Date('2026-12-08T05:00:00Z'))).toBe('2026-12-07');
    expect(dateIn('America/Chicago', new Date('2026-12-08T06:30:00Z'))).toBe('2026-12-08');
  });

  it('says a date in words', () => {
    expect(longDate('2026-12-08')).toBe('Tuesday, December 8');
  });
});
