export interface HolidayRule {
  readonly title: string;
  /** RFC 5545 RRULE values, joined by newlines: the nominal day and the weekdays it may be observed on. */
  readonly rules: string;
}

/** A holiday on a fixed date: the date itself, and the Friday before or the Monday after where those are observed. */
const fixedDate = (title: string, day: string, fridayBefore: string, mondayAfter: string): HolidayRule => ({
  title,
  rules: [
    `FREQ=YEARLY;${day}`,
    `FREQ=YEARLY;${fridayBefore};BYDAY=FR`,
    `FREQ=YEARLY;${mondayAfter};BYDAY=MO`,
  ].join('\n'),
});
const floating = (title: string, rule: string): HolidayRule => ({ title, rules: `FREQ=YEARLY;${rule}` });

/**
 * The federal holidays (5 U.S.C. 6103) as yearly recurrence rules, for entering them as blackouts. A Friday the 3rd of July can
 * only be there when the 4th is a Saturday, so each observed day is a rule of its own. January 1 needs December 31 of the year before.
 */
export const federalHolidayRules: readonly HolidayRule[] = [
  fixedDate("New Year's Day", 'BYMONTH=1;BYMONTHDAY=1', 'BYMONTH=12;BYMONTHDAY=31', 'BYMONTH=1;BYMONTHDAY=2'),
  floating('Birthday of Martin Luther King, Jr.', 'BYMONTH=1;BYDAY=3MO'),
  floating("Washington's Birthday", 'BYMONTH=2;BYDAY=3MO'),
  floating('Memorial Day', 'BYMONTH=5;BYDAY=-1MO'),
  fixedDate(
    'Juneteenth National Independence Day',
    'BYMONTH=6;BYMONTHDAY=19',
    'BYMONTH=6;BYMONTHDAY=18',
    'BYMONTH=6;BYMONTHDAY=20',
  ),
  fixedDate('Independence Day', 'BYMONTH=7;BYMONTHDAY=4', 'BYMONTH=7;BYMONTHDAY=3', 'BYMONTH=7;BYMONTHDAY=5'),
  floating('Labor Day', 'BYMONTH=9;BYDAY=1MO'),
  floating('Columbus Day', 'BYMONTH=10;BYDAY=2MO'),
  fixedDate(
    'Veterans Day',
    'BYMONTH=11;BYMONTHDAY=11',
    'BYMONTH=11;BYMONTHDAY=10',
    'BYMONTH=11;BYMONTHDAY=12',
  ),
  floating('Thanksgiving Day', 'BYMONTH=11;BYDAY=4TH'),
  fixedDate(
    'Christmas Day',
    'BYMONTH=12;BYMONTHDAY=25',
    'BYMONTH=12;BYMONTHDAY=24',
    'BYMONTH=12;BYMONTHDAY=26',
  ),
];
