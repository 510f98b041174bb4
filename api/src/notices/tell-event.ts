import type { Arrival, Parcel, Run } from '@shared/contract';
import type { Deps } from '../deps';
import { pageUrl } from './addresses';
import { cancelEvent, requestEvent, type InvitationMessage } from './invitations';
import { invitedPeople } from './invitation-queries';
import type { NoticeEvent } from './notices-service';
import { post } from './outbox';
import { arrivalEvent, collectionEvent, collectionWindow, packedBy, runEvent, stopLine } from './planned-events';
import { letter, type LetterParts } from './templates/letter';
import { clockSpan, clockTime, contentsInWords, count, localDate, longDate } from './words';

type Of<K extends NoticeEvent['kind']> = Extract<NoticeEvent, { kind: K }>;
interface Person {
  readonly id: number;
  readonly name: string;
  readonly email: string;
}

const part = (message: InvitationMessage | null) => (message ? { method: message.method, text: message.text } : null);

/** Writes one person's mail; `calendar` null leaves it without an invitation. */
async function mail(deps: Deps, key: string, to: Person, parts: LetterParts, calendar: InvitationMessage | null = null) {
  await post(deps, { key: `${key}:to-${to.id}`, to, letter: letter(parts), calendar: part(calendar) });
}

const what = (parcel: Parcel) => contentsInWords(parcel.contents);
const parcelPage = (deps: Deps, parcel: Parcel) => ({ label: 'Open the parcel', url: pageUrl(deps.config, `/parcels/${parcel.id}`) });
const arrivalPage = (parcel: Parcel) => ({ label: 'See the arrival', url: parcel.arrivalUrl });
const breederOf = async (deps: Deps, parcel: Parcel): Promise<Person> => {
  const { id, name, email } = await deps.services.people.get(parcel.breeder.id);
  return { id, name, email };
};
const shopOf = (parcel: Parcel) => parcel.breeder.businessName ?? parcel.breeder.name;
const tokenOf = (parcel: Parcel) => parcel.arrivalUrl.split('/').at(-1) ?? '';

/** The one-time link that sets a password. */
export async function accountLink(deps: Deps, event: Of<'account-link'>): Promise<void> {
  const person = await deps.services.people.get(event.personId);
  const invited = event.link === 'invitation';
  await mail(deps, `account-link:${event.url}`, person, {
    subject: invited ? 'Your invitation to the circle' : 'Set a new password',
    lead: invited ? 'You are invited' : 'Somebody asked for a new password',
    large: invited ? 'Choose your password' : 'Set a new password',
    paragraphs: [
      invited ? 'The circle shares its drive to the counter. Choose a password to come in.' : 'If that was not you, leave this mail alone: nothing changes.',
      `The link works once, until ${clockTime(event.expiresAt, person.zone)} on ${longDate(localDate(event.expiresAt, person.zone))}.`,
    ],
    button: { label: invited ? 'Choose a password' : 'Set the password', url: event.url },
  });
}

/** The buyer's link, when a parcel is entered. */
export async function parcelCreated(deps: Deps, parcel: Parcel): Promise<void> {
  await mail(deps, `parcel-created:${parcel.id}:${parcel.buyer.email}`, parcel.buyer, {
    subject: `Your ${what(parcel)} from ${shopOf(parcel)}`,
    lead: `${shopOf(parcel)} is planning to ship`,
    large: `Your ${what(parcel)}`,
    paragraphs: ['The day is chosen by the forecast. You will hear as soon as it is set. On your page you can say which mornings suit you.'],
    facts: [['Parcel', parcel.code], ['Place', `${parcel.destination.name}, ${parcel.destination.city}, ${parcel.destination.state}`]],
    button: arrivalPage(parcel),
    planning: true,
  });
}

/** The planned date, to the buyer; the calendar invitation follows with the run. */
export async function parcelBooked(deps: Deps, parcel: Parcel): Promise<void> {
  if (parcel.arrivalDate === null) return;
  await mail(deps, `parcel-booked:${parcel.id}:${parcel.version}`, parcel.buyer, {
    subject: `Planned arrival: ${longDate(parcel.arrivalDate)}`,
    lead: `Your ${what(parcel)} is planned to arrive`,
    large: longDate(parcel.arrivalDate),
    paragraphs: ['The date can still change with the forecast. You will hear at once.'],
    facts: [['Parcel', parcel.code], ['Place', `${parcel.destination.name}, ${parcel.destination.city}, ${parcel.destination.state}`]],
    button: arrivalPage(parcel),
    planning: true,
  });
}

/** Taken off its day, or cancelled: breeder and buyer hear, and the buyer's event leaves the calendar. */
export async function parcelOff(deps: Deps, parcel: Parcel, event: Of<'parcel-on-hold'> | Of<'parcel-cancelled'>): Promise<void> {
  const held = event.kind === 'parcel-on-hold';
  const key = `${event.kind}:${parcel.id}:${parcel.version}`;
  if (held)
    await mail(deps, key, await breederOf(deps, parcel), {
      subject: `${parcel.code} is on hold`,
      lead: event.shipDate ? `Taken off ${longDate(event.shipDate)}` : 'Taken off its day',
      large: `${parcel.code} is on hold`,
      paragraphs: [event.reason, 'Choose another day on the parcel’s page; the buyer has been told that the date no longer stands.'],
      facts: [['Animal', what(parcel)], ['Destination', `${parcel.destination.city}, ${parcel.destination.state}`]],
      button: parcelPage(deps, parcel),
      planning: true,
    });
  const gone = await cancelEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer);
  await mail(
    deps,
    key,
    parcel.buyer,
    {
      subject: held ? 'The arrival date no longer stands' : `${parcel.code} has been cancelled`,
      lead: `Your ${what(parcel)} from ${shopOf(parcel)}`,
      large: held ? 'A new day is being chosen' : 'The parcel has been cancelled',
      paragraphs: [held ? 'The day is no longer safe or possible, so nothing is shipped on it. You will hear as soon as the next day is set.' : 'Nothing will be shipped. Ask the breeder if you did not expect this.'],
      button: arrivalPage(parcel),
      planning: held,
    },
    gone,
  );
}

/** Everybody on a run whose own plan is new or has changed since they last heard; the others hear nothing. */
export async function runPlanned(deps: Deps, run: Run, why: string | null): Promise<void> {
  const key = `run-${run.id}:${run.version}`;
  const parcels = await deps.services.parcels.byIds(run.parcels.map((parcel) => parcel.id));
  const people = new Map((await Promise.all(run.stops.map((stop) => deps.services.people.get(stop.breederId)))).map((p) => [p.id, p]));
  await tellCoordinator(deps, run, key, new Map([...people].flatMap(([id, p]) => (p.phone ? [[id, p.phone] as const] : []))));
  for (const stop of run.stops) {
    const breeder = people.get(stop.breederId);
    // A breeder who drives has the stop in the event of the drive already.
    if (!breeder || breeder.id === run.coordinator.id) continue;
    const url = pageUrl(deps.config, `/runs/${run.id}`);
    const message = await requestEvent(deps, { kind: 'run', id: run.id }, breeder, collectionEvent(run, stop, url));
    if (!message) continue;
    await mail(deps, `${key}:collection`, breeder, {
      subject: `Collection on ${longDate(run.date)} at ${clockTime(stop.arriveAt, run.zone)}`,
      lead: message.isNew ? 'Your parcels are on a run' : 'Your collection has changed',
      large: `${longDate(run.date)}, ${clockTime(stop.arriveAt, run.zone)}`,
      paragraphs: [...(why ? [why] : []), `Have the boxes packed and sealed ${packedBy(run, stop)}. ${run.coordinator.name} drives.`],
      facts: run.parcels.filter((p) => p.breederId === stop.breederId).map((p) => [p.code, `${p.what} to ${p.destination}`] as const),
      button: { label: 'Open the run', url },
      planning: true,
    }, message);
  }
  for (const parcel of parcels) await tellBuyerOfRun(deps, parcel, key);
}

async function tellCoordinator(deps: Deps, run: Run, key: string, phones: ReadonlyMap<number, string>): Promise<void> {
  const { id, name, email } = await deps.services.people.get(run.coordinator.id);
  const url = pageUrl(deps.config, `/runs/${run.id}`);
  // A breeder who drives has one event a run; the drive holds the stop at their own place.
  const message = await requestEvent(deps, { kind: 'run', id: run.id }, { id, name, email }, runEvent(run, phones, url));
  if (!message) return;
  await mail(deps, `${key}:drive`, { id, name, email }, {
    subject: `${message.isNew ? 'Run' : 'Changed run'} on ${longDate(run.date)}: leave at ${clockTime(run.departAt, run.zone)}`,
    lead: `${count(run.stops.length, 'stop')}, ${count(run.parcels.length, 'parcel')}`,
    large: `${longDate(run.date)}, leave at ${clockTime(run.departAt, run.zone)}`,
    paragraphs: [...run.stops.map((stop) => stopLine(run, stop, phones.get(stop.breederId))), `Hand over at the ${run.counter.name} before ${clockTime(run.cutOffAt, run.zone)}.`],
    button: { label: 'Open the run', url },
    planning: true,
  }, message);
}

async function tellBuyerOfRun(deps: Deps, parcel: Parcel, key: string): Promise<void> {
  const arrival = await deps.services.arrivals.byToken(tokenOf(parcel));
  const window = collectionWindow(arrival, parcel.shipDate);
  if (!window) return;
  const event = arrivalEvent(arrival, window, parcel.arrivalUrl);
  const message = await requestEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer, event);
  if (!message) return;
  await mail(deps, `${key}:arrival-${parcel.id}`, parcel.buyer, buyerLetter(parcel, arrival, window), message);
}

function buyerLetter(parcel: Parcel, arrival: Arrival, window: { date: string; from: string; to: string }): LetterParts {
  const { place } = arrival;
  return {
    subject: `Arrives ${longDate(window.date)}: ${what(parcel)}`,
    lead: `Your ${what(parcel)} from ${shopOf(parcel)} arrives`,
    large: longDate(window.date),
    paragraphs: [
      arrival.service === 'hold'
        ? `Collect it at the ${place.name} ${clockSpan(window.from, window.to, place.zone, place.city)}.`
        : `It comes to your door ${clockSpan(window.from, window.to, place.zone, place.city)}.`,
      'The date can still change with the forecast. You will hear at once, and your calendar follows.',
    ],
    facts: [
      ['Place', `${place.name}, ${place.street}, ${place.city}, ${place.state} ${place.postalCode}`],
      ['Parcel', parcel.code],
      ...arrival.bring.map((thing) => ['Bring', thing] as const),
    ],
    button: arrivalPage(parcel),
    planning: true,
  };
}

/** Those who were on the run and are on it no longer get their event taken back. */
export async function leftTheRun(deps: Deps, run: Run, removedParcelIds: readonly number[], why: string): Promise<void> {
  const key = `run-${run.id}:${run.version}:left`;
  const staying = new Set([run.coordinator.id, ...run.stops.map((stop) => stop.breederId)]);
  for (const id of await invitedPeople(deps.db, { kind: 'run', id: run.id })) {
    if (staying.has(id)) continue;
    await takeBack(deps, run, id, key, why);
  }
  for (const parcel of await deps.services.parcels.byIds(removedParcelIds)) await takeBackArrival(deps, parcel, key);
}

/** A called-off run leaves every calendar. */
export async function runCalledOff(deps: Deps, run: Run, event: Of<'run-called-off'>): Promise<void> {
  const key = `run-${run.id}:called-off`;
  for (const id of await invitedPeople(deps.db, { kind: 'run', id: run.id })) await takeBack(deps, run, id, key, event.reason);
  for (const parcel of await deps.services.parcels.byIds(event.parcelIds)) await takeBackArrival(deps, parcel, key);
}

async function takeBack(deps: Deps, run: Run, personId: number, key: string, why: string): Promise<void> {
  const { id, name, email } = await deps.services.people.get(personId);
  const message = await cancelEvent(deps, { kind: 'run', id: run.id }, { id, name, email });
  await mail(deps, key, { id, name, email }, {
    subject: `No collection on ${longDate(run.date)}`,
    lead: 'Taken out of your calendar',
    large: `The run on ${longDate(run.date)} goes without you or not at all`,
    paragraphs: [why],
    button: { label: 'Open your parcels', url: pageUrl(deps.config, '/parcels') },
  }, message);
}

async function takeBackArrival(deps: Deps, parcel: Parcel, key: string): Promise<void> {
  const message = await cancelEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer);
  if (!message) return;
  await mail(deps, `${key}:arrival-${parcel.id}`, parcel.buyer, {
    subject: 'The arrival date no longer stands',
    lead: `Your ${what(parcel)} from ${shopOf(parcel)}`,
    large: 'A new day is being chosen',
    paragraphs: ['The run it was on does not go with it. You will hear as soon as the next day is set.'],
    button: arrivalPage(parcel),
    planning: true,
  }, message);
}

/** On its way: each buyer, with the tracking number. */
export async function runHandedOver(deps: Deps, run: Run): Promise<void> {
  for (const parcel of await deps.services.parcels.byIds(run.parcels.map((p) => p.id)))
    await mail(deps, `run-handed-over:${run.id}:${parcel.id}`, parcel.buyer, {
      subject: `On its way: ${what(parcel)}`,
      lead: `Your ${what(parcel)} from ${shopOf(parcel)}`,
      large: parcel.arrivalDate ? `On its way for ${longDate(parcel.arrivalDate)}` : 'On its way',
      paragraphs: ['It has been handed over to the carrier.'],
      facts: [['Parcel', parcel.code], ...(parcel.trackingNumber ? [['Tracking number', parcel.trackingNumber] as const] : [])],
      button: arrivalPage(parcel),
      planning: true,
    });
}

/** The buyer said which mornings suit, or reported the arrival: the breeder hears. */
export async function buyerSpoke(deps: Deps, parcel: Parcel, kind: 'mornings-said' | 'arrival-reported'): Promise<void> {
  const said = kind === 'mornings-said';
  const mornings = parcel.mornings.map((m) => [longDate(m.date), m.suits ? 'suits' : 'does not suit'] as const);
  await mail(deps, `${kind}:${parcel.id}:${parcel.updatedAt}:${parcel.version}`, await breederOf(deps, parcel), {
    subject: said ? `${parcel.code}: mornings that suit the buyer` : `${parcel.code}: the buyer has reported the arrival`,
    lead: parcel.buyer.name,
    large: said ? 'Mornings that suit' : 'The arrival is reported',
    paragraphs: [said ? 'The buyer has said when they can collect.' : 'Open the parcel to read the report.'],
    facts: said ? mornings : [],
    button: parcelPage(deps, parcel),
  });
}
