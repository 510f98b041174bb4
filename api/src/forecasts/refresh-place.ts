import type { Clock } from '../clock';
import type { ForecastPlace } from '@shared/forecast/outdoor-forecast';
import { isAppError } from '@shared/errors';
import type { ForecastClient } from './forecast-client';
import type { CacheChange, CacheState } from './forecast-queries';

/**
 * Asks the service about one place and says what to write down: forecast and alerts are asked for side by side, and one
 * that fails leaves what was known of it untouched. Never throws for the service's sake.
 */
export async function refreshPlace(
  client: ForecastClient,
  clock: Clock,
  place: ForecastPlace,
  state: CacheState | undefined,
): Promise<CacheChange> {
  const held = { gridPath: state?.gridPath ?? null, lastModified: state?.lastModified ?? null };
  const [forecast, alerts] = await Promise.allSettled([client.forecast(place, held), client.alerts(place)]);
  const at = clock.nowIso();
  const problems = [forecast, alerts].flatMap((part) =>
    part.status === 'rejected' ? [sentence(part.reason)] : [],
  );
  return {
    ...(forecast.status === 'fulfilled' ? forecastChange(forecast.value, at) : {}),
    ...(alerts.status === 'fulfilled' ? { alerts: alerts.value, alertsFetchedAt: at } : {}),
    problem: problems.length === 0 ? null : [...new Set(problems)].join(' '),
    triedAt: at,
  };
}

function forecastChange(
  { gridPath, lastModified, series }: Awaited<ReturnType<ForecastClient['forecast']>>,
  fetchedAt: string,
): Partial<CacheChange> {
  if (series === null) return { fetchedAt };
  const { startMs, tempsF, issuedAt } = series;
  return { gridPath, lastModified, series: { startMs, tempsF }, issuedAt, fetchedAt };
}

/** Our own faults are not the service's: they surface as what they are. */
function sentence(error: unknown): string {
  if (!isAppError(error, 'forecast-unavailable')) throw error;
  return error.message;
}
