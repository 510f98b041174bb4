import { AppError } from '../errors';
import { parseGrid } from './parse-grid';

interface Value {
  validTime: string;
  value: unknown;
}
const hour = (at: number, duration: string, value: unknown): Value => ({
  validTime: `2026-12-01T${String(at).padStart(2, '0')}:00:00+00:00/${duration}`,
  value,
});
const grid = (
  values: Value[],
  uom: string | undefined = 'wmoUnit:degC',
  extra: Record<string, unknown> = {},
) => ({
  properties: {
    updateTime: '2026-12-01T05:36:55+00:00',
    gridX: 83,
    gridY: 73,
    temperature: uom === '' ? { values } : { uom, values },
    ...extra,
  },
});

describe('a raw grid', () => {
  it('spreads merged hours and keeps its order', () => {
    // Whole °F converted by the service: 36, 35, 37 °F are 2.222…, 1.666…, 2.777… °C.
    const series = parseGrid(
      grid([
        hour(6, 'PT1H', 2.2222222222222223),
        hour(7, 'PT3H', 1.6666666666666667),
        hour(10, 'PT2H', 2.7777777777777777),
      ]),
    );
    expect(series.startMs).toBe(Date.parse('2026-12-01T06:00:00Z'));
    expect(series.tempsF).toEqual([36, 35, 35, 35, 37, 37]);
    expect(series.issuedAt).toBe('2026-12-01T05:36:55.000Z');
  });

  it.each([
    ['wmoUnit:degC', 0, 32],
    ['unit:degC', 100 / 9, 52],
    ['http://codes.wmo.int/common/unit/degC', -40, -40],
    ['wmoUnit:degF', 51, 51],
    ['unit:degF', -4, -4],
  ])('goes by the suffix of the unit %s', (uom, value, expectedF) => {
    expect(parseGrid(grid([hour(6, 'PT1H', value)], uom)).tempsF).toEqual([expectedF]);
  });

  it('keeps nulls, and hours between the spans, as null', () => {
    const series = parseGrid(grid([hour(6, 'PT1H', 10), hour(7, 'PT2H', null), hour(11, 'PT1H', 10)]));
    expect(series.tempsF).toEqual([50, null, null, null, null, 50]);
  });

  it('lays spans that miss the full hour by a second where they belong', () => {
    const late = { validTime: '2026-12-01T06:00:01+00:00/PT1H', value: 10 };
    const early = { validTime: '2026-12-01T06:59:59+00:00/PT2H', value: 20 };
    const series = parseGrid(grid([late, early]));
    expect(series).toMatchObject({ startMs: Date.parse('2026-12-01T06:00:00Z'), tempsF: [50, 68, 68] });
  });

  it('takes a fill value for none', () => {
    expect(parseGrid(grid([hour(6, 'PT1H', -9999), hour(7, 'PT1H', 10)])).tempsF).toEqual([null, 50]);
  });

  it('puts spans that came out of order where they belong', () => {
    expect(parseGrid(grid([hour(8, 'PT1H', 20), hour(6, 'PT2H', 10)])).tempsF).toEqual([50, 50, 68]);
  });

  it('takes grid coordinates as numbers and as text', () => {
    const values = [hour(6, 'PT1H', 10)];
    expect(parseGrid(grid(values, undefined, { gridX: '83', gridY: '73' }))).toEqual(parseGrid(grid(values)));
  });

  it('takes empty layers without a unit beside the temperature', () => {
    const extra = { snowLevel: { values: [] }, maxTemperature: { uom: 'wmoUnit:degC', values: [] } };
    expect(parseGrid(grid([hour(6, 'PT1H', 10)], undefined, extra)).tempsF).toEqual([50]);
  });

  it.each<[string, unknown, RegExp]>([
    ['an empty temperature layer', grid([], ''), /no temperatures/],
    ['nulls only', grid([hour(6, 'PT1H', null)]), /no temperatures/],
    ['values without a unit', grid([hour(6, 'PT1H', 10)], ''), /unit is missing/],
    ['kelvin', grid([hour(6, 'PT1H', 280)], 'wmoUnit:K'), /“wmoUnit:K”/],
    ['text for a value', grid([hour(6, 'PT1H', '10')]), /temperature\.values\.0\.value/],
    [
      'no layer at all',
      { properties: { updateTime: '2026-12-01T05:36:55+00:00' } },
      /properties\.temperature/,
    ],
    ['an unknown validTime', grid([{ validTime: 'tomorrow', value: 3 }]), /tomorrow/],
    [
      'an updateTime that is none',
      grid([hour(6, 'PT1H', 1)], undefined, { updateTime: 'just now' }),
      /just now/,
    ],
    ['forty days', grid([hour(6, 'P40D', 1)]), /40 days/],
    ['a problem document', { type: 'urn:noaa:nws:api:UnexpectedProblem', status: 500 }, /properties/],
    ['a page', '<html></html>', /grid/],
    ['nothing', null, /grid/],
  ])('with %s is refused in words', (_what, json, message) => {
    expect(() => parseGrid(json)).toThrow(AppError);
    expect(() => parseGrid(json)).toThrow(message);
  });
});
