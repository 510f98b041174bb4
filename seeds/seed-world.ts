import type { Parcel } from '../shared/src/contract';
import type { Deps } from '../api/src/deps';
import type { Actor } from '../api/src/http/actor';
import { addDays } from '../shared/src/calendar/add-days';
import { blackoutCalendar } from '../shared/src/calendar/blackout-calendar';
import { isWorkingDay } from '../shared/src/calendar/is-working-day';
import { counterPlace } from '../shared/src/calendar/work-place';
import { buyers } from './circle-people';
import type { ParcelSeed } from './circle-parcels';
import type { SeededPlaces } from './seed-places';

/** What every part of the seed works with. */
export interface SeedWorld {
  /** The present. */
  readonly deps: Deps;
  /** The same site with its clock set to another instant (epoch ms). */
  readonly at: (epochMs: number) => Deps;
  readonly places: SeededPlaces;
  /** Ids by e-mail. */
  readonly people: ReadonlyMap<string, number>;
  /** The circle's zone and today's date there. */
  readonly zone: string;
  readonly today: string;
}

/** The person behind an e-mail as one who asks. */
export async function actorOf({ deps, people }: SeedWorld, email: string): Promise<Actor> {
  const { id, name, roles, zone } = await deps.services.people.get(known(people, email));
  return { id, name, email, roles, zone };
}

/** Enters a parcel as its breeder would, on the clock of `deps`. */
export async function enterParcel(
  world: SeedWorld,
  deps: Deps,
  seed: ParcelSeed,
  span: { readonly readyFrom: string; readonly latestDate: string },
): Promise<Parcel> {
  const { people, places } = world;
  const buyer = buyers.find(([, email]) => email === seed.buyer);
  if (!buyer) throw new Error(`Nobody has the address ${seed.buyer}.`);
  const [name, email, city] = buyer;
  const { phone } = await deps.services.people.get(known(people, email));
  return deps.services.parcels.create(await actorOf(world, seed.breeder), {
    buyer: { name, email, phone },
    contents: seed.contents.map(([kind, quantity]) => {
      const { id: speciesId, massG } = known(places.species, kind);
      return { speciesId, quantity, massG };
    }),
    boxId: known(places.boxes, seed.box),
    service: 'hold',
    holdCounterId: known(places.counters, city),
    door: null,
    ...span,
    lastMealDate: addDays(span.readyFrom, -5),
    note: '',
  });
}

/** Whether an overnight parcel can go from the circle's counter on a date and be handed out the day after. */
export async function isShipDay({ deps, places }: SeedWorld, date: string): Promise<boolean> {
  const place = counterPlace(await deps.services.places.counter(known(places.counters, 'San Antonio')));
  const calendar = blackoutCalendar(await deps.services.blackouts.all(), date, addDays(date, 1));
  return isWorkingDay(place, date, calendar) && isWorkingDay(place, addDays(date, 1), calendar);
}

/** The nearest ship days before a date, latest first. */
export async function shipDaysBefore(world: SeedWorld, date: string, count: number): Promise<string[]> {
  const found: string[] = [];
  for (let back = 1; found.length < count && back < 40; back += 1) {
    const day = addDays(date, -back);
    if (await isShipDay(world, day)) found.push(day);
  }
  return found;
}

export function known<T>(map: ReadonlyMap<string, T>, key: string): T {
  const value = map.get(key);
  if (value === undefined) throw new Error(`The seed names ${key}, which it does not know.`);
  return value;
}
