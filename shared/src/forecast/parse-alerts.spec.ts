import { AppError } from '../errors';
import { parseAlerts } from './parse-alerts';

const alert = (extra: Record<string, unknown> = {}) => ({
  geometry: null,
  properties: {
    id: 'urn:oid:2.49.0.1.840.0.1',
    event: 'Extreme Cold Warning',
    severity: 'Extreme',
    headline: 'Extreme Cold Warning until noon',
    status: 'Actual',
    messageType: 'Alert',
    effective: '2026-12-01T05:00:00-06:00',
    onset: '2026-12-02T00:00:00-06:00',
    expires: '2026-12-01T18:00:00-06:00',
    ends: '2026-12-02T12:00:00-06:00',
    ...extra,
  },
});
const list = (...features: unknown[]) => ({ type: 'FeatureCollection', features });
const window = (extra: Record<string, unknown>) => {
  const [first] = parseAlerts(list(alert(extra)));
  return [first?.from, first?.to];
};

describe('active alerts', () => {
  it('are reduced to what a verdict needs, with their window in UTC', () => {
    expect(parseAlerts(list(alert()))).toEqual([
      {
        id: 'urn:oid:2.49.0.1.840.0.1',
        event: 'Extreme Cold Warning',
        severity: 'Extreme',
        headline: 'Extreme Cold Warning until noon',
        from: '2026-12-02T06:00:00.000Z',
        to: '2026-12-02T18:00:00.000Z',
      },
    ]);
  });

  it('begin when they take effect where no onset is given', () => {
    expect(window({ onset: null })).toEqual(['2026-12-01T11:00:00.000Z', '2026-12-02T18:00:00.000Z']);
  });

  it('end when they expire where no end is given', () => {
    expect(window({ ends: null, onset: null })).toEqual([
      '2026-12-01T11:00:00.000Z',
      '2026-12-02T00:00:00.000Z',
    ]);
  });

  it('end at their end also when the message expires later', () => {
    expect(window({ expires: '2026-12-03T00:00:00-06:00' })[1]).toBe('2026-12-02T18:00:00.000Z');
  });

  it('last a day when the message expires before the event begins and no end is given', () => {
    expect(window({ ends: null })).toEqual(['2026-12-02T06:00:00.000Z', '2026-12-03T06:00:00.000Z']);
  });

  it('count with an outline as well as without', () => {
    const drawn = { ...alert(), geometry: { type: 'Polygon', coordinates: [] } };
    expect(parseAlerts(list(drawn, alert()))).toHaveLength(2);
  });

  it.each([{ status: 'Test' }, { status: 'Exercise' }, { status: 'Draft' }, { messageType: 'Cancel' }])(
    'that are not meant are left out: %j',
    (extra) => {
      expect(parseAlerts(list(alert(extra)))).toEqual([]);
    },
  );

  it('without a headline or severity still count', () => {
    expect(parseAlerts(list(alert({ headline: null, severity: undefined })))[0]).toMatchObject({
      headline: 'Extreme Cold Warning',
      severity: 'Unknown',
    });
  });

  it('are none in an empty list', () => {
    expect(parseAlerts(list())).toEqual([]);
  });

  it.each<[string, unknown]>([
    ['an alert without an event', list(alert({ event: undefined }))],
    ['an alert without expiry', list(alert({ expires: undefined }))],
    ['an alert with neither onset nor effective', list(alert({ onset: null, effective: null }))],
    ['a time that is none', list(alert({ ends: 'soon' }))],
    ['no features', {}],
    ['a page', '<html>'],
  ])('with %s are refused as a whole', (_what, json) => {
    expect(() => parseAlerts(json)).toThrow(AppError);
  });
});
