import { AppError } from '../errors';
import { parsePoints } from './parse-points';

describe('a grid address', () => {
  it('is read from /points', () => {
    const json = {
      properties: {
        gridId: 'LZK',
        gridX: 83,
        gridY: 73,
        forecastGridData: 'https://api.weather.gov/gridpoints/LZK/83,73',
        forecastHourly: 'https://api.weather.gov/gridpoints/LZK/83,73/forecast/hourly',
        timeZone: 'America/Chicago',
      },
    };
    expect(parsePoints(json)).toEqual({
      gridUrl: 'https://api.weather.gov/gridpoints/LZK/83,73',
      hourlyUrl: 'https://api.weather.gov/gridpoints/LZK/83,73/forecast/hourly',
      zone: 'America/Chicago',
    });
  });

  it.each([{}, null, { properties: { forecastGridData: null } }, { properties: { forecastGridData: '' } }])(
    'is refused where there is no grid: %j',
    (json) => {
      expect(() => parsePoints(json)).toThrow(AppError);
    },
  );
});
