import { Settings } from 'luxon';
import { ageText, clock, dayLabel, minuteText } from './dates';

beforeAll(() => {
  Settings.defaultLocale = 'en-US';
});

// Expected texts are the CLDR forms of American English, written by hand; the space before AM/PM may be a narrow one.
const plain = (text: string) => text.replace(/\u202f/g, ' ');

describe('dayLabel', () => {
  it('needs no year within the year', () => {
    expect(dayLabel('2026-12-08', 'long', 2026)).toBe('Tuesday, December 8');
  });
  it('names another year', () => {
    expect(dayLabel('2027-01-04', 'medium', 2026)).toBe('Mon, Jan 4, 2027');
  });
});

describe('clock', () => {
  it('names the zone when the viewer lives by another clock', () => {
    expect(plain(clock('2026-12-09T16:00:00.000Z', 'America/Phoenix', 'auto', 'America/Chicago'))).toBe(
      '9:00 AM MST',
    );
  });
  it('leaves the zone out when both clocks agree', () => {
    expect(plain(clock('2026-12-09T16:00:00.000Z', 'America/Phoenix', 'auto', 'America/Denver'))).toBe(
      '9:00 AM',
    );
  });
});

describe('ageText', () => {
  it.each([
    [0, 'just now'],
    [40, '40 min'],
    [300, '5 h'],
    [4320, '3 days'],
  ])('%d minutes read %s', (minutes, text) => {
    expect(ageText(minutes)).toBe(text);
  });
});

describe('minuteText', () => {
  it('reads minutes after midnight as a clock', () => {
    expect(plain(minuteText(990))).toBe('4:30 PM');
  });
});
