import { arrivalsRoutes } from './arrivals/arrivals-routes';
import { calendarsRoutes } from './calendars/calendars-routes';
import type { Deps } from './deps';
import { deskRoutes } from './desk/desk-routes';
import type { AnyRoute } from './http/route';
import { blackoutsRoutes } from './blackouts/blackouts-routes';
import { daysRoutes } from './days/days-routes';
import { liveRoutes } from './live/live-routes';
import { parcelsRoutes } from './parcels/parcels-routes';
import { peopleRoutes } from './people/people-routes';
import { placesRoutes } from './places/places-routes';
import { policyRoutes } from './policy/policy-routes';
import { runRoutes } from './runs/runs-routes';
import { sessionRoutes } from './session/session-routes';

/** Every feature's routes; the router and the OpenAPI document are made from this list. */
export function allRoutes(deps: Deps): readonly AnyRoute[] {
  return [
    ...sessionRoutes(deps),
    ...placesRoutes(deps),
    ...peopleRoutes(deps),
    ...parcelsRoutes(deps),
    ...arrivalsRoutes(deps),
    ...runRoutes(deps),
    ...daysRoutes(deps),
    ...blackoutsRoutes(deps),
    ...deskRoutes(deps),
    ...calendarsRoutes(deps),
    ...policyRoutes(deps),
    ...liveRoutes(deps),
  ];
}
