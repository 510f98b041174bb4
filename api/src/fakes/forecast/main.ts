import { createForecastFake } from './forecast-fake';

/**
 * The fake weather service as a process of its own. FORECAST_FAKE_PORT (0: a free one), FORECAST_FAKE_SEED (1), and
 * DAYBERTH_NOW to freeze its clock. FORECAST_FAKE_SEASON_SHIFT_DAYS (0) plays another time of the year. Says where it listens in one line, and ends with its parent.
 */
async function main(): Promise<void> {
  const {
    FORECAST_FAKE_PORT = '0',
    FORECAST_FAKE_SEED = '1',
    FORECAST_FAKE_SEASON_SHIFT_DAYS = '0',
    DAYBERTH_NOW,
  } = process.env;
  const frozenMs = DAYBERTH_NOW ? Date.parse(DAYBERTH_NOW) : null;
  const now = () => frozenMs ?? Date.now();
  const fake = createForecastFake({
    seed: Number(FORECAST_FAKE_SEED),
    now,
    seasonShiftDays: Number(FORECAST_FAKE_SEASON_SHIFT_DAYS),
  });
  const port = await fake.listen(Number(FORECAST_FAKE_PORT));
  process.stdout.write(`forecast fake listening on http://127.0.0.1:${port}\n`);
  const end = () => void fake.close().then(() => process.exit(0));
  for (const signal of ['SIGTERM', 'SIGINT', 'disconnect'] as const) process.once(signal, end);
  // A parent that was killed sends no signal, but its child gets another parent.
  const parent = process.ppid;
  setInterval(() => process.ppid !== parent && end(), 1000).unref();
}

void main();
