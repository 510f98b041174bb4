import { readConfig } from './config';

const good = {
  SESSION_SECRET: 'forty characters of a secret, at least 32',
  SMTP_URL: 'smtp://127.0.0.1:2525',
  MAIL_FROM: 'Circle <circle@example.org>',
  FORECAST_URL: 'https://api.weather.gov',
  FORECAST_USER_AGENT: '(circle.example.org, admin@example.org)',
};

describe('readConfig', () => {
  it('fills in the port, the file and the address', () => {
    expect(readConfig(good)).toMatchObject({
      PORT: 4300,
      DATABASE_FILE: 'data/dayberth.sqlite',
      PUBLIC_URL: 'http://127.0.0.1:4300',
      DEMO: false,
    });
  });

  it('names every variable that is missing, and never a value', () => {
    expect(() => readConfig({ SESSION_SECRET: 'too short', SMTP_URL: 'gopher://secret-host' })).toThrow(
      /SESSION_SECRET must have at least 32[\s\S]*SMTP_URL must start with smtp[\s\S]*MAIL_FROM is missing[\s\S]*FORECAST_URL/,
    );
    try {
      readConfig({ SESSION_SECRET: 'too short' });
    } catch (error) {
      expect(String(error)).not.toContain('too short');
    }
  });

  const production = { ...good, NODE_ENV: 'production', PUBLIC_URL: 'https://circle.example.org' };
  it.each([
    [
      'a frozen clock',
      { ...production, DAYBERTH_NOW: '2026-12-01T12:00:00Z' },
      /DAYBERTH_NOW is refused in production/,
    ],
    ['the demo with real services', { ...production, DEMO: '1' }, /DEMO is refused in production/],
    [
      'plain http',
      { ...production, PUBLIC_URL: 'http://circle.example.org' },
      /PUBLIC_URL must start with https/,
    ],
  ])('refuses %s in production', (_what, env, message) => {
    expect(() => readConfig(env)).toThrow(message);
  });

  it('takes an ordinary production', () => {
    expect(readConfig(production).NODE_ENV).toBe('production');
  });
});
