import type * as z from 'zod';
import type { Box, Counter, Parcel, parcelNew, PostalCodeInfo, Species } from '@shared/contract';
import { badInput, type FieldProblem } from '@shared/errors';
import { bandConflict } from '@shared/parcels/common-band';
import { doorRefusal } from '@shared/parcels/door-refusal';
import type { Deps } from '../deps';

/** What a person says of a parcel: the fields of `POST` with the drop-off counter known. */
export type ParcelFacts = Omit<z.output<typeof parcelNew>, 'breederId' | 'dropOffCounterId'> & {
  readonly dropOffCounterId: number;
};

/** The facts of a stored parcel, in the shape they were entered in. */
export function factsOf(parcel: Parcel): ParcelFacts {
  const { street, city, state, postalCode, counterId } = parcel.destination;
  return {
    buyer: { name: parcel.buyer.name, email: parcel.buyer.email, phone: parcel.buyer.phone },
    contents: parcel.contents.map(({ speciesId, quantity, massG }) => ({ speciesId, quantity, massG })),
    boxId: parcel.box.id,
    service: parcel.service,
    holdCounterId: counterId,
    door: parcel.service === 'door' ? { street, city, state, postalCode } : null,
    readyFrom: parcel.readyFrom,
    latestDate: parcel.latestDate,
    lastMealDate: parcel.lastMealDate,
    note: parcel.note,
    dropOffCounterId: parcel.dropOff.counterId,
  };
}

export interface CheckedFacts {
  /** Where the door is; null for hold service. */
  readonly doorPlace: PostalCodeInfo | null;
  /** The clock of the destination. */
  readonly zone: string;
  readonly dropOff: Counter;
  /** Null for door service. */
  readonly hold: Counter | null;
  readonly box: Box;
  readonly speciesById: ReadonlyMap<number, Species>;
}

/**
 * Holds the facts against the circle's places and species. What stood in `stored` already may stay although it was
 * retired since. Throws 400 with a complaint at each field's path.
 */
export async function checkFacts(
  deps: Deps,
  facts: ParcelFacts,
  stored: ParcelFacts | null,
): Promise<CheckedFacts> {
  const { places } = deps.services;
  const [counters, species, boxes] = [await places.counters(), await places.species(), await places.boxes()];
  const doorPlace =
    facts.service === 'door' && facts.door ? await places.postalCode(facts.door.postalCode) : null;
  const dropOff = counters.find((one) => one.id === facts.dropOffCounterId);
  const today = deps.clock.today(dropOff?.zone ?? 'America/Chicago');
  const errors = [
    ...checkContents(facts, stored, species),
    ...checkBox(facts, stored, boxes),
    ...checkRoute(facts, stored, counters, doorPlace),
    ...checkDates(facts, stored, today),
  ];
  if (errors.length > 0) throw badInput(errors);
  const hold = (facts.service === 'hold' && counters.find((one) => one.id === facts.holdCounterId)) || null;
  const box = boxes.find((one) => one.id === facts.boxId);
  const zone = facts.service === 'door' ? doorPlace?.zone : hold?.zone;
  // The foreign keys of a stored parcel and the checks above leave no other case; it would be our own fault.
  if (!dropOff || !box || zone === undefined) throw new Error('A checked parcel names a place that is gone.');
  return { doorPlace, zone, dropOff, hold, box, speciesById: new Map(species.map((one) => [one.id, one])) };
}

/** The parcel as it would be with other facts; nothing is saved. */
export function withFacts(parcel: Parcel, facts: ParcelFacts, checked: CheckedFacts): Parcel {
  const { dropOff, hold, box, zone, speciesById } = checked;
  const door = facts.door && { counterId: null, name: parcel.destination.name, ...facts.door, zone };
  return {
    ...parcel,
    contents: facts.contents.map((line) => {
      const one = speciesById.get(line.speciesId);
      return { ...line, commonName: one?.commonName ?? '', scientificName: one?.scientificName ?? '' };
    }),
    totalMassG: facts.contents.reduce((sum, line) => sum + line.quantity * line.massG, 0),
    box: { id: box.id, name: box.name, volumeL: box.volumeL },
    service: facts.service,
    dropOff: {
      counterId: dropOff.id,
      name: dropOff.name,
      city: dropOff.city,
      state: dropOff.state,
      zone: dropOff.zone,
    },
    destination: hold ? { ...placeOf(hold), counterId: hold.id } : (door ?? parcel.destination),
    readyFrom: facts.readyFrom,
    latestDate: facts.latestDate,
    lastMealDate: facts.lastMealDate,
  };
}

const placeOf = ({ name, street, city, state, postalCode, zone }: Counter) => ({
  name,
  street,
  city,
  state,
  postalCode,
  zone,
});

function checkContents(
  facts: ParcelFacts,
  stored: ParcelFacts | null,
  all: readonly Species[],
): FieldProblem[] {
  const kept = new Set(stored?.contents.map((line) => line.speciesId));
  const byId = new Map(all.map((one) => [one.id, one]));
  const errors = facts.contents.flatMap((line, i) => {
    const one = byId.get(line.speciesId);
    if (kept.has(line.speciesId) || one?.active) return [];
    const message = one
      ? `The circle does not ship the ${one.commonName} any more.`
      : 'That species is not on the list.';
    return [{ path: `contents.${i}.speciesId`, message }];
  });
  const known = facts.contents.flatMap((line) => byId.get(line.speciesId) ?? []);
  const conflict = bandConflict(known);
  if (conflict !== null) errors.push({ path: 'contents', message: conflict });
  const atDoor = doorRefusal(facts.service, known);
  if (atDoor) errors.push({ path: 'service', message: atDoor });
  return errors;
}

function checkBox(facts: ParcelFacts, stored: ParcelFacts | null, boxes: readonly Box[]): FieldProblem[] {
  const box = boxes.find((one) => one.id === facts.boxId);
  if (facts.boxId === stored?.boxId || box?.active) return [];
  return [
    { path: 'boxId', message: box ? 'That box is not used any more.' : 'That box is not on the list.' },
  ];
}

function checkRoute(
  facts: ParcelFacts,
  stored: ParcelFacts | null,
  counters: readonly Counter[],
  doorPlace: PostalCodeInfo | null,
): FieldProblem[] {
  const errors: FieldProblem[] = [];
  const complain = (
    path: string,
    storedId: number | null | undefined,
    id: number,
    can: 'canHold' | 'canDropOff',
    cannot: string,
  ) => {
    const counter = counters.find((one) => one.id === id);
    if (id === storedId || (counter?.active && counter[can])) return;
    errors.push({ path, message: counter?.active ? cannot : 'That counter is not on the list.' });
  };
  complain(
    'dropOffCounterId',
    stored?.dropOffCounterId,
    facts.dropOffCounterId,
    'canDropOff',
    'That counter takes no drop-offs.',
  );
  if (facts.service === 'hold') {
    if (facts.holdCounterId === null)
      errors.push({ path: 'holdCounterId', message: 'Choose the counter where the buyer collects.' });
    else
      complain(
        'holdCounterId',
        stored?.holdCounterId,
        facts.holdCounterId,
        'canHold',
        'That counter holds no parcels for pickup.',
      );
  } else if (!facts.door) errors.push({ path: 'door', message: "Enter the buyer's address." });
  else if (!doorPlace) errors.push({ path: 'door.postalCode', message: 'That ZIP code is not known.' });
  else if (doorPlace.state !== facts.door.state)
    errors.push({ path: 'door.state', message: `ZIP ${doorPlace.postalCode} is in ${doorPlace.state}.` });
  return errors;
}

function checkDates(facts: ParcelFacts, stored: ParcelFacts | null, today: string): FieldProblem[] {
  if (facts.latestDate < facts.readyFrom)
    return [{ path: 'latestDate', message: 'The latest day is before the first.' }];
  if (facts.latestDate < today && facts.latestDate !== stored?.latestDate)
    return [{ path: 'latestDate', message: 'The latest day is over.' }];
  return [];
}
