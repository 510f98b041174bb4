import { isAppError } from '../errors';
import { parseValidTime } from './parse-valid-time';

const span = (start: string, end: string) => ({ startMs: Date.parse(start), endMs: Date.parse(end) });

describe('an ISO 8601 interval', () => {
  // ISO 8601-1:2019, 5.5.2: start/end, start/duration, duration/end.
  it.each([
    ['2026-12-01T06:00:00+00:00/PT1H', span('2026-12-01T06:00:00Z', '2026-12-01T07:00:00Z')],
    ['2026-12-01T06:00:00+00:00/PT3H', span('2026-12-01T06:00:00Z', '2026-12-01T09:00:00Z')],
    ['2026-12-01T06:00:00+00:00/P1D', span('2026-12-01T06:00:00Z', '2026-12-02T06:00:00Z')],
    ['2026-12-01T11:00:00+00:00/P8DT2H', span('2026-12-01T11:00:00Z', '2026-12-09T13:00:00Z')],
    ['2026-12-01T00:00:00-06:00/PT30M', span('2026-12-01T06:00:00Z', '2026-12-01T06:30:00Z')],
    ['2026-12-01T06:00:00Z/2026-12-01T08:00:00Z', span('2026-12-01T06:00:00Z', '2026-12-01T08:00:00Z')],
    [
      '2026-12-01T00:00:00-06:00/2026-12-01T09:00:00+01:00',
      span('2026-12-01T06:00:00Z', '2026-12-01T08:00:00Z'),
    ],
    ['PT2H/2026-12-01T08:00:00+00:00', span('2026-12-01T06:00:00Z', '2026-12-01T08:00:00Z')],
    ['2026-12-01T06:00:00+00:00 / PT1H', span('2026-12-01T06:00:00Z', '2026-12-01T07:00:00Z')],
    // A day by duration is 24 hours of UTC, also when the clocks change in between.
    ['2026-03-08T06:00:00+00:00/P1D', span('2026-03-08T06:00:00Z', '2026-03-09T06:00:00Z')],
  ])('%s is read', (text, expected) => {
    expect(parseValidTime(text)).toEqual(expected);
  });

  it.each([
    '',
    '/',
    'PT1H',
    '2026-12-01T06:00:00Z',
    '2026-12-01T06:00:00Z/',
    'PT1H/PT1H',
    'yesterday/PT1H',
    '2026-12-01T06:00:00Z/PT0H',
    '2026-12-01T06:00:00Z/-PT1H',
    '2026-12-01T06:00:00Z/PT-1H',
    '2026-12-01T08:00:00Z/2026-12-01T06:00:00Z',
    '2026-12-01T06:00:00Z/2026-12-01T06:00:00Z',
    '2026-12-01T06:00:00/PT1H',
    '2026-13-01T06:00:00Z/PT1H',
    '2026-12-01T06:00:00Z/PT1H/PT1H',
    'NOW/PT1H',
  ])('“%s” is refused with a forecast error', (text) => {
    let thrown: unknown;
    try {
      parseValidTime(text);
    } catch (error) {
      thrown = error;
    }
    expect(isAppError(thrown, 'forecast-unavailable')).toBe(true);
  });
});
