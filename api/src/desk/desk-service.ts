import type { Desk, Health } from '@shared/contract';
import { addDays } from '@shared/calendar/add-days';
import { appVersion } from '../app-version';
import type { Deps } from '../deps';
import type { ForecastStatus } from '../forecasts/forecasts-service';
import type { Actor } from '../http/actor';
import { parcelsNeedingAttention, runsNeedingAttention } from './attention';
import { databaseAnswers, deskCounts, placesInUse } from './desk-queries';

export interface DeskService {
  /**
   * For anybody: the database, the mail queue and the age of the forecasts that parcels wait on, without names. Never
   * throws.
   */
  health(): Promise<Health>;
  /** What needs an admin's attention at present. */
  desk(actor: Actor): Promise<Desk>;
}

/** Runs and parcels older than this have long been somebody's affair elsewhere. Assumption. */
const lookBackDays = 30;

/** The admin's desk and the site's health. */
export function createDeskService(deps: Deps): DeskService {
  return {
    health: () => health(deps),
    desk: (actor) => desk(deps, actor),
  };
}

async function health({ db, services, clock }: Deps): Promise<Health> {
  if (!(await databaseAnswers(db))) return failing;
  const mailQueue = await services.notices.queue();
  const { policy } = await services.policy.current();
  const inUse = new Set((await placesInUse(db)).map(({ key }) => key));
  const statuses = (await services.forecasts.status()).filter(({ placeKey }) => inUse.has(placeKey));
  const ages = statuses.flatMap(({ fetchedAt }) =>
    fetchedAt === null ? [] : [Math.max(0, Math.round((clock.nowMs() - Date.parse(fetchedAt)) / 60_000))],
  );
  const newest = ages.length > 0 ? Math.min(...ages) : null;
  const silent = inUse.size > 0 && (newest === null || newest > policy.forecastMaxAgeHours * 60);
  return {
    status: silent || mailQueue.failed > 0 ? 'degraded' : 'ok',
    database: 'ok',
    mailQueue,
    forecasts: {
      places: inUse.size,
      oldestMinutes: ages.length > 0 ? Math.max(...ages) : null,
      newestMinutes: newest,
    },
    version: appVersion,
  };
}

const failing: Health = {
  status: 'degraded',
  database: 'failing',
  mailQueue: { waiting: 0, failed: 0 },
  forecasts: { places: 0, oldestMinutes: null, newestMinutes: null },
  version: appVersion,
};

async function desk(deps: Deps, actor: Actor): Promise<Desk> {
  const { db, services, clock } = deps;
  const { policy } = await services.policy.current();
  const today = clock.today(policy.circleZone);
  const runs = await services.runs.list(actor, { from: addDays(today, -lookBackDays) });
  const parcels = await services.parcels.inStates(['seeking', 'booked', 'packed', 'handed-over', 'on-hold']);
  return {
    forecasts: await forecastsNeedingAttention(deps, policy.forecastMaxAgeHours),
    failedMail: await services.notices.failedMail(),
    mailWaiting: (await services.notices.queue()).waiting,
    runs: runsNeedingAttention(runs, today),
    parcels: parcelsNeedingAttention(parcels, today),
    counts: await deskCounts(db, today),
  };
}

/** Of the places that decide about a parcel, those without a forecast, with an old one, or with a failure. */
async function forecastsNeedingAttention(deps: Deps, maxAgeHours: number): Promise<Desk['forecasts']> {
  const statuses = new Map(
    (await deps.services.forecasts.status()).map((status) => [status.placeKey, status]),
  );
  const places = await placesInUse(deps.db);
  return places.flatMap(({ key, name }) => {
    const status = statuses.get(key);
    const problem = forecastComplaint(status, deps.clock.nowMs(), maxAgeHours);
    if (problem === null) return [];
    return [
      { place: name, issuedAt: status?.issuedAt ?? null, fetchedAt: status?.fetchedAt ?? null, problem },
    ];
  });
}

function forecastComplaint(
  status: ForecastStatus | undefined,
  nowMs: number,
  maxAgeHours: number,
): string | null {
  if (!status) return 'No forecast has been fetched yet.';
  if (status.problem !== null) return status.problem;
  if (status.issuedAt === null) return 'No forecast has been fetched yet.';
  const hours = (nowMs - Date.parse(status.issuedAt)) / 3_600_000;
  return hours > maxAgeHours
    ? `Issued ${Math.floor(hours)} h ago; no day is open on a forecast that old.`
    : null;
}
