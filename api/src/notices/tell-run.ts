import type { Parcel, Person, Run, RunStop } from '@shared/contract';
import type { Deps } from '../deps';
import { pageUrl } from './addresses';
import { arrivalLetter, plannedArrival } from './arrival-letters';
import { cancelEvent, requestEvent } from './invitations';
import { invitedPeople } from './invitation-queries';
import { arrivalEvent, collectionEvent, packedBy, runEvent, stopLine } from './planned-events';
import { clockTime, count, dateLines, longDate } from './words';
import {
  arrivalPage,
  becauseBuyer,
  becauseOnRun,
  personOf,
  placeOf,
  shopOf,
  what,
  writeMail,
  type Of,
} from './write-mail';

const pageOf = (deps: Deps, run: Run): string => pageUrl(deps.config, `/runs/${run.id}`);
const subjectOf = (run: Run) => ({ kind: 'run', id: run.id }) as const;

/** Everybody on a run whose own plan is new or has changed since they last heard; the others hear nothing. */
export async function runPlanned(deps: Deps, run: Run, why: string | null): Promise<void> {
  const key = `run-${run.id}:${run.version}`;
  const breeders = new Map<number, Person>();
  for (const stop of run.stops) breeders.set(stop.breederId, await deps.services.people.get(stop.breederId));
  await tellCoordinator(deps, run, key, breeders);
  for (const stop of run.stops) {
    const breeder = breeders.get(stop.breederId);
    // A breeder who drives has the stop in the event of the drive already.
    if (breeder && breeder.id !== run.coordinator.id)
      await tellBreeder(deps, run, stop, { key, breeder, why });
  }
  for (const parcel of await deps.services.parcels.byIds(run.parcels.map(({ id }) => id)))
    await tellBuyerOfRun(deps, parcel, key);
}

async function tellBreeder(
  deps: Deps,
  run: Run,
  stop: RunStop,
  { key, breeder, why }: { key: string; breeder: Person; why: string | null },
): Promise<void> {
  const url = pageOf(deps, run);
  const message = await requestEvent(deps, subjectOf(run), breeder, collectionEvent(run, stop, url));
  if (!message) return;
  const at = clockTime(stop.arriveAt, run.zone);
  await writeMail(
    deps,
    `${key}:collection`,
    breeder,
    {
      subject: `${message.isNew ? 'Collection' : 'Changed collection'} on ${longDate(run.date)} at ${at}`,
      lead: message.isNew ? 'Your parcels are on a run' : 'Your collection has changed',
      large: [longDate(run.date), at],
      paragraphs: [
        ...(why && !message.isNew ? [why] : []),
        `${run.coordinator.name} collects at ${at} (${run.counter.city} time). Have the boxes packed and sealed ${packedBy(run, stop)}.`,
      ],
      facts: run.parcels
        .filter((parcel) => parcel.breederId === stop.breederId)
        .map((parcel) => [parcel.code, `${parcel.what} to ${parcel.destination}`] as const),
      button: { label: 'Open the run', url },
      planning: true,
      because: becauseOnRun,
    },
    message,
  );
}

async function tellCoordinator(
  deps: Deps,
  run: Run,
  key: string,
  breeders: ReadonlyMap<number, Person>,
): Promise<void> {
  const driver = await personOf(deps, run.coordinator.id);
  const phones = new Map([...breeders].flatMap(([id, { phone }]) => (phone ? [[id, phone] as const] : [])));
  const url = pageOf(deps, run);
  // A breeder who drives has one event a run; the drive holds the stop at their own place.
  const message = await requestEvent(deps, subjectOf(run), driver, runEvent(run, phones, url));
  if (!message) return;
  const leave = clockTime(run.departAt, run.zone);
  await writeMail(
    deps,
    `${key}:drive`,
    driver,
    {
      subject: `${message.isNew ? 'Run' : 'Changed run'} on ${longDate(run.date)}: leave at ${leave}`,
      lead: message.isNew ? 'Your run is confirmed' : 'Your run has changed',
      large: [longDate(run.date), `leave ${leave}`],
      paragraphs: [
        `${count(run.stops.length, 'stop')}, ${count(run.parcels.length, 'parcel')}. All times are ${run.counter.city} time.`,
      ],
      steps: [
        ...run.stops.map((stop) => stopLine(run, stop, phones.get(stop.breederId))),
        `${clockTime(run.arriveAt, run.zone)} ${run.counter.name}: hand over before the cut-off at ${clockTime(run.cutOffAt, run.zone)}`,
      ],
      button: { label: 'Open the run', url },
      planning: true,
      because: becauseOnRun,
    },
    message,
  );
}

async function tellBuyerOfRun(deps: Deps, parcel: Parcel, key: string): Promise<void> {
  const planned = await plannedArrival(deps, parcel);
  if (!planned) return;
  const event = arrivalEvent(planned.arrival, planned.window, parcel.arrivalUrl);
  const message = await requestEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer, event);
  if (!message) return;
  const letter = arrivalLetter(parcel, planned, message.isNew);
  await writeMail(deps, `${key}:arrival-${parcel.id}`, parcel.buyer, letter, message);
}

/** Those who were on the run and are on it no longer get their event taken back. */
export async function leftTheRun(
  deps: Deps,
  run: Run,
  removedParcelIds: readonly number[],
  why: string,
): Promise<void> {
  const key = `run-${run.id}:${run.version}:left`;
  const staying = new Set([run.coordinator.id, ...run.stops.map((stop) => stop.breederId)]);
  for (const id of await invitedPeople(deps.db, subjectOf(run)))
    if (!staying.has(id)) await takeBack(deps, run, id, { key, why, off: false });
  for (const parcel of await deps.services.parcels.byIds(removedParcelIds))
    await takeBackArrival(deps, parcel, key);
}

/** A called-off run leaves every calendar. */
export async function runCalledOff(deps: Deps, run: Run, event: Of<'run-called-off'>): Promise<void> {
  const key = `run-${run.id}:called-off`;
  for (const id of await invitedPeople(deps.db, subjectOf(run)))
    await takeBack(deps, run, id, { key, why: event.reason, off: true });
  for (const parcel of await deps.services.parcels.byIds(event.parcelIds))
    await takeBackArrival(deps, parcel, key);
}

async function takeBack(
  deps: Deps,
  run: Run,
  personId: number,
  { key, why, off }: { key: string; why: string; off: boolean },
): Promise<void> {
  const person = await personOf(deps, personId);
  const message = await cancelEvent(deps, subjectOf(run), person);
  if (!message) return;
  const drives = personId === run.coordinator.id;
  await writeMail(
    deps,
    key,
    person,
    {
      subject: off
        ? `Called off: the run on ${longDate(run.date)}`
        : `No collection on ${longDate(run.date)}`,
      lead: off ? 'This run is called off' : 'The run goes without a stop at your place',
      large: dateLines(run.date),
      paragraphs: [
        why,
        drives
          ? 'Nothing is to be driven. Its parcels wait for another run.'
          : 'Nobody comes to collect. A parcel that still has its day waits for another run.',
      ],
      button: drives
        ? { label: 'Open the runs', url: pageUrl(deps.config, '/runs') }
        : { label: 'Open your parcels', url: pageUrl(deps.config, '/parcels') },
      because: 'You get this because you were on this run.',
    },
    message,
  );
}

async function takeBackArrival(deps: Deps, parcel: Parcel, key: string): Promise<void> {
  const message = await cancelEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer);
  if (!message) return;
  await writeMail(
    deps,
    `${key}:arrival-off-${parcel.id}`,
    parcel.buyer,
    {
      subject: 'The arrival is not certain any more',
      lead: `Your ${what(parcel)} from ${shopOf(parcel)}`,
      large: ['The ride is being arranged anew'],
      paragraphs: [
        'The drive to the carrier’s counter that it was on does not take it. You hear as soon as another is arranged or another day is chosen; until then there is nothing to collect.',
      ],
      facts: [
        ...(parcel.arrivalDate ? [['Was to arrive', longDate(parcel.arrivalDate)] as const] : []),
        ['Parcel', parcel.code],
        ['Place', placeOf(parcel)],
      ],
      button: arrivalPage(parcel),
      planning: true,
      because: becauseBuyer(parcel),
    },
    message,
  );
}

/** On its way: each buyer, with the tracking number. */
export async function runHandedOver(deps: Deps, run: Run): Promise<void> {
  for (const parcel of await deps.services.parcels.byIds(run.parcels.map(({ id }) => id)))
    await writeMail(deps, `run-handed-over:${run.id}:${parcel.id}`, parcel.buyer, {
      subject: `On the way: ${what(parcel)}`,
      lead: `On the way: your ${what(parcel)} from ${shopOf(parcel)}`,
      large: parcel.arrivalDate ? dateLines(parcel.arrivalDate) : ['Handed over'],
      paragraphs: [
        'It has been handed over to the carrier. The carrier’s own tracking says more than we can from here on.',
      ],
      facts: [
        ...(parcel.trackingNumber ? [['Tracking number', parcel.trackingNumber] as const] : []),
        ['Parcel', parcel.code],
        ['Place', placeOf(parcel)],
      ],
      button: arrivalPage(parcel),
      planning: true,
      because: becauseBuyer(parcel),
    });
}
