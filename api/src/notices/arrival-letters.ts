import type { Arrival, Parcel } from '@shared/contract';
import type { Deps } from '../deps';
import { requestEvent, type InvitationMessage } from './invitations';
import { arrivalEvent, collectionWindow, type CollectionWindow } from './planned-events';
import type { LetterParts } from './templates/letter';
import { clockSpan, dateLines, longDate } from './words';
import { arrivalPage, becauseBuyer, placeOf, shopOf, tokenOf, what } from './write-mail';

interface Planned {
  readonly arrival: Arrival;
  readonly window: CollectionWindow;
}

/** The arrival with its times; null while no day stands. */
export async function plannedArrival(deps: Deps, parcel: Parcel): Promise<Planned | null> {
  const arrival = await deps.services.arrivals.byToken(tokenOf(parcel));
  const window = collectionWindow(arrival, parcel.shipDate);
  return window && { arrival, window };
}

/** Brings the arrival into the buyer's calendar or changes it there; null when it stands so already. */
export async function arrivalInvitation(deps: Deps, parcel: Parcel): Promise<InvitationMessage | null> {
  const planned = await plannedArrival(deps, parcel);
  if (!planned) return null;
  const event = arrivalEvent(planned.arrival, planned.window, parcel.arrivalUrl);
  return requestEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer, event);
}

const mayChange = 'The date can still change with the forecast; if it does, you hear at once.';

/** The day is chosen; when and where to collect follows with the run. */
export async function bookedLetter(deps: Deps, parcel: Parcel, arrivalDate: string): Promise<LetterParts> {
  const planned = await plannedArrival(deps, parcel);
  return {
    subject: `Planned arrival: ${longDate(arrivalDate)}`,
    lead: `Planned arrival of your ${what(parcel)}`,
    large: dateLines(arrivalDate),
    paragraphs: [...(planned ? [whereAndWhen(planned)] : []), mayChange],
    facts: [
      ['Parcel', parcel.code],
      ['Place', placeOf(parcel)],
    ],
    button: arrivalPage(parcel),
    planning: true,
    because: becauseBuyer(parcel),
  };
}

/** The ride is arranged: the date, the place, the times and what to bring. */
export function arrivalLetter(parcel: Parcel, planned: Planned, isNew: boolean): LetterParts {
  const { arrival, window } = planned;
  const { place } = arrival;
  return {
    subject: `${isNew ? 'Arrival on' : 'New arrival on'} ${longDate(window.date)}: ${what(parcel)}`,
    lead: `${isNew ? 'Arrival' : 'New arrival'} of your ${what(parcel)} from ${shopOf(parcel)}`,
    large: dateLines(window.date),
    paragraphs: [whereAndWhen(planned), mayChange],
    facts: [
      ['Place', `${place.name}\n${place.street}\n${place.city}, ${place.state} ${place.postalCode}`],
      ...(place.hours ? [['Hours', place.hours] as const] : []),
      ['Parcel', parcel.code],
    ],
    list: { label: arrival.service === 'hold' ? 'Bring' : 'Have ready', items: arrival.bring },
    button: arrivalPage(parcel),
    planning: true,
    because: becauseBuyer(parcel),
  };
}

function whereAndWhen({ arrival, window }: Planned): string {
  const { place, service } = arrival;
  const span = clockSpan(window.from, window.to, place.zone, place.city);
  return service === 'hold'
    ? `Ready to collect at the ${place.name} ${span}.`
    : `The carrier comes to your door ${span}. Somebody must be there to take the box in.`;
}
