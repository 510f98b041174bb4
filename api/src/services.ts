import { createArrivalsService, type ArrivalsService } from './arrivals/arrivals-service';
import { createBlackoutsService, type BlackoutsService } from './blackouts/blackouts-service';
import { createDaysService, type DaysService } from './days/days-service';
import { createCalendarsService, type CalendarsService } from './calendars/calendars-service';
import type { Deps } from './deps';
import { createDeskService, type DeskService } from './desk/desk-service';
import { createForecastsService, type ForecastsService } from './forecasts/forecasts-service';
import { createHistoryService, type HistoryService } from './history/history-service';
import { createNoticesService, type NoticesService } from './notices/notices-service';
import { createParcelsService, type ParcelsService } from './parcels/parcels-service';
import { createPeopleService, type PeopleService } from './people/people-service';
import { createPlacesService, type PlacesService } from './places/places-service';
import { createPolicyService, type PolicyService } from './policy/policy-service';
import { createRechecksService, type RechecksService } from './rechecks/recheck-service';
import { createRunsService, type RunsService } from './runs/runs-service';
import { createSessionService, type SessionService } from './session/session-service';

/** Every feature's service. Another feature is only ever reached through this. */
export interface Services {
  readonly arrivals: ArrivalsService;
  readonly blackouts: BlackoutsService;
  readonly calendars: CalendarsService;
  readonly days: DaysService;
  readonly desk: DeskService;
  readonly forecasts: ForecastsService;
  readonly history: HistoryService;
  readonly notices: NoticesService;
  readonly parcels: ParcelsService;
  readonly people: PeopleService;
  readonly places: PlacesService;
  readonly policy: PolicyService;
  readonly rechecks: RechecksService;
  readonly runs: RunsService;
  readonly session: SessionService;
}

const makers: { readonly [K in keyof Services]: (deps: Deps) => Services[K] } = {
  arrivals: createArrivalsService,
  blackouts: createBlackoutsService,
  calendars: createCalendarsService,
  days: createDaysService,
  desk: createDeskService,
  forecasts: createForecastsService,
  history: createHistoryService,
  notices: createNoticesService,
  parcels: createParcelsService,
  people: createPeopleService,
  places: createPlacesService,
  policy: createPolicyService,
  rechecks: createRechecksService,
  runs: createRunsService,
  session: createSessionService,
};

/**
 * Builds each service at its first use, so that services may call one another in a circle. Call another service as
 * `deps.services.parcels.get(…)` inside a method, not while a factory runs.
 */
export function createServices(deps: Deps): Services {
  const made: Partial<Record<keyof Services, unknown>> = {};
  return new Proxy({} as Services, {
    get: (_target, name) => {
      const key = name as keyof Services;
      return (made[key] ??= makers[key](deps));
    },
  });
}
