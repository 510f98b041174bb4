import { AppError } from '../errors';
import { parseHourly } from './parse-hourly';

const period = (clock: string, until: string, temperature: unknown, temperatureUnit?: string) => ({
  startTime: `2026-12-01T${clock}:00:00-06:00`,
  endTime: `2026-12-01T${until}:00:00-06:00`,
  temperature,
  ...(temperatureUnit === undefined ? {} : { temperatureUnit }),
});
const hourly = (...periods: unknown[]) => ({
  properties: { updateTime: '2026-12-01T11:00:00+00:00', periods },
});

describe('an hourly forecast', () => {
  it('is read with its offset, temperatures as numbers with a unit beside', () => {
    const series = parseHourly(hourly(period('06', '07', 41, 'F'), period('07', '08', 5, 'C')));
    expect(series.startMs).toBe(Date.parse('2026-12-01T12:00:00Z'));
    expect(series.tempsF).toEqual([41, 41]);
    expect(series.issuedAt).toBe('2026-12-01T11:00:00.000Z');
  });

  it('is read with temperatures as quantities', () => {
    const quantity = { unitCode: 'wmoUnit:degC', value: 20 };
    expect(
      parseHourly(hourly(period('06', '07', quantity), period('07', '08', { ...quantity, value: null })))
        .tempsF,
    ).toEqual([68, null]);
  });

  it.each<[string, unknown, RegExp]>([
    ['no periods', hourly(), /no temperatures/],
    ['a number without a unit', hourly(period('06', '07', 41)), /unit is missing/],
    ['a period that runs backwards', hourly(period('07', '06', 41, 'F')), /ends before it starts/],
    [
      'a time without an offset',
      hourly({ ...period('06', '07', 41, 'F'), startTime: '2026-12-01T06:00:00' }),
      /offset/,
    ],
    ['no properties', {}, /properties/],
  ])('with %s is refused in words', (_what, json, message) => {
    expect(() => parseHourly(json)).toThrow(AppError);
    expect(() => parseHourly(json)).toThrow(message);
  });
});
