import type { Service } from '../contract/common';
import type { Box, Counter, Hub } from '../contract/places';
import type { BlackoutCalendar } from '../calendar/blackout-calendar';
import type { OutdoorForecast } from '../forecast/outdoor-forecast';
import type { Policy } from '../policy/policy';
import type { ContentsLine } from './contents-limits';

/** A door has no counter: it counts as worked Monday to Friday by the carrier that brings the parcel. */
export interface DoorPlace {
  readonly name: string;
  readonly city: string;
  readonly state: string;
  readonly zone: string;
}
export type Destination =
  { readonly kind: 'hold'; readonly counter: Counter } | { readonly kind: 'door'; readonly door: DoorPlace };

/** Everything about a route and its parcel that the verdict of any of its days rests on. All of it is read, none changed. */
export interface RouteQuestion {
  /** UTC ISO instant. */
  readonly now: string;
  readonly service: Service;
  readonly contents: readonly ContentsLine[];
  readonly box: Box;
  readonly origin: Counter;
  readonly hub: Hub;
  readonly destination: Destination;
  /** Null: not said, which limits nothing. */
  readonly readyFrom: string | null;
  readonly latestDate: string | null;
  readonly lastMealDate: string | null;
  /** What the buyer said of single mornings. */
  readonly mornings: readonly { readonly date: string; readonly suits: boolean }[];
  /** Both ends count. */
  readonly breederDaysAway: readonly { readonly from: string; readonly to: string }[];
  /** Must reach from the day before the first ship day to `calendarReachDays` after the last. */
  readonly calendar: BlackoutCalendar;
  readonly policy: Policy;
  readonly weather: {
    readonly origin: OutdoorForecast | null;
    readonly hub: OutdoorForecast | null;
    readonly destination: OutdoorForecast | null;
  };
}

/** One ship day of a route. */
export interface DayQuestion extends RouteQuestion {
  readonly shipDate: string;
}

/** Days a calendar has to reach beyond the last ship day: the arrival, the slack, and the next working day after a long break. */
export const calendarReachDays = 14;
