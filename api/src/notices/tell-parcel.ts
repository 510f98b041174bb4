import type { Parcel } from '@shared/contract';
import type { Deps } from '../deps';
import { arrivalInvitation, bookedLetter } from './arrival-letters';
import { cancelEvent } from './invitations';
import { findInvitation, invitedPeople } from './invitation-queries';
import { takeBackMails } from './outbox-queries';
import type { LetterParts } from './templates/letter';
import { clockTime, dateLines, dayAfter, localDate, longDate } from './words';
import {
  arrivalPage,
  becauseBreeder,
  becauseBuyer,
  parcelPage,
  personOf,
  placeOf,
  shopOf,
  what,
  writeMail,
  type Of,
} from './write-mail';

/** The one-time link that sets a password. */
export async function accountLink(deps: Deps, event: Of<'account-link'>): Promise<void> {
  const person = await deps.services.people.get(event.personId);
  const invited = event.link === 'invitation';
  const { policy } = await deps.services.policy.current();
  const until = `${clockTime(event.expiresAt, person.zone)} on ${longDate(localDate(event.expiresAt, person.zone))}`;
  await writeMail(deps, `account-link:${event.url}`, person, {
    subject: invited ? `Your invitation to the ${policy.circleName}` : 'Set a new password',
    lead: invited ? `You are invited to the ${policy.circleName}` : 'Somebody asked for a new password',
    large: [invited ? 'Choose your password' : 'Set a new password'],
    paragraphs: [
      invited
        ? 'The circle shares its drive to the carrier’s counter. Choose a password to come in.'
        : 'If that was not you, leave this mail alone: nothing changes.',
      `The link works once, until ${until}.`,
    ],
    button: { label: invited ? 'Choose a password' : 'Set the password', url: event.url },
    because: invited
      ? 'You get this because an admin of the circle entered your address.'
      : 'You get this because your address was entered on the page for forgotten passwords.',
  });
}

/** The buyer's link, when a parcel is entered or gets another buyer; a former buyer's event is taken back. */
export async function parcelCreated(deps: Deps, parcel: Parcel): Promise<void> {
  await formerBuyers(deps, parcel);
  await writeMail(deps, `parcel-created:${parcel.id}:${parcel.buyer.email}`, parcel.buyer, {
    subject: `Your ${what(parcel)} from ${shopOf(parcel)}`,
    lead: `${shopOf(parcel)} is planning to ship`,
    large: [`Your ${what(parcel)}`],
    paragraphs: [
      'The day is chosen by the forecast along the whole way, and you hear as soon as it is set. On your page you can say which mornings suit you.',
    ],
    facts: [
      ['Parcel', parcel.code],
      ['Place', placeOf(parcel)],
    ],
    button: { ...arrivalPage(parcel), label: 'Say which mornings suit' },
    planning: true,
    because: becauseBuyer(parcel),
  });
}

async function formerBuyers(deps: Deps, parcel: Parcel): Promise<void> {
  const subject = { kind: 'arrival', id: parcel.id } as const;
  for (const id of await invitedPeople(deps.db, subject)) {
    if (id === parcel.buyer.id) continue;
    const former = await personOf(deps, id);
    const message = await cancelEvent(deps, subject, former);
    await writeMail(
      deps,
      `parcel-other-buyer:${parcel.id}:${parcel.version}`,
      former,
      {
        subject: `${parcel.code} is not addressed to you any more`,
        lead: `The ${what(parcel)} from ${shopOf(parcel)}`,
        large: ['It goes to somebody else'],
        paragraphs: [`Ask ${shopOf(parcel)} if you did not expect this.`],
        because: becauseBuyer(parcel),
      },
      message,
    );
  }
}

/**
 * The planned date, to the buyer. The calendar invitation follows with the run; only an event that leaves the calendar in
 * the same breath moves to the new date instead, and the mail that would have said so is not sent.
 */
export async function parcelBooked(deps: Deps, parcel: Parcel): Promise<void> {
  if (parcel.arrivalDate === null) return;
  const unsent = await takeBackMails(deps.db, cancelKey(parcel));
  const standing = await findInvitation(deps.db, { kind: 'arrival', id: parcel.id }, parcel.buyer.id);
  const moves = unsent.length > 0 || standing?.method === 'REQUEST';
  const message = moves ? await arrivalInvitation(deps, parcel) : null;
  await writeMail(
    deps,
    `parcel-booked:${parcel.id}:${parcel.version}`,
    parcel.buyer,
    await bookedLetter(deps, parcel, parcel.arrivalDate),
    message,
  );
}

/** Taken off its day: breeder and buyer hear, and the buyer's event leaves the calendar. */
export async function parcelOnHold(deps: Deps, parcel: Parcel, event: Of<'parcel-on-hold'>): Promise<void> {
  const key = `parcel-on-hold:${parcel.id}:${parcel.version}`;
  const from = event.shipDate ? ` ${longDate(event.shipDate)}` : ' its day';
  await writeMail(deps, key, await personOf(deps, parcel.breeder.id), {
    subject: `${parcel.code} is off${from}`,
    lead: `${parcel.code}, ${what(parcel)} to ${parcel.destination.city}, ${parcel.destination.state}`,
    large: [`Taken off${from}`],
    paragraphs: [
      event.reason,
      'Choose another day on the parcel’s page. The buyer has been told that the date no longer stands.',
    ],
    facts: [
      ['Parcel', parcel.code],
      ['Buyer', parcel.buyer.name],
    ],
    button: { ...parcelPage(deps, parcel), label: 'Choose another day' },
    planning: true,
    because: becauseBreeder,
  });
  await tellBuyerOff(deps, parcel, key, {
    subject: 'The arrival date no longer stands',
    lead: `Your ${what(parcel)} from ${shopOf(parcel)}`,
    large: ['A new day is being chosen'],
    paragraphs: [
      'It is not shipped on the day that was planned. You hear as soon as the next one is set; until then there is nothing to collect.',
    ],
    facts: [
      ...(event.shipDate ? [['Was to arrive', longDate(dayAfter(event.shipDate))] as const] : []),
      ['Parcel', parcel.code],
    ],
    button: arrivalPage(parcel),
    planning: true,
    because: becauseBuyer(parcel),
  });
}

/** Cancelled for good: the buyer hears, and the event leaves the calendar. */
export async function parcelCancelled(deps: Deps, parcel: Parcel): Promise<void> {
  await tellBuyerOff(deps, parcel, `parcel-cancelled:${parcel.id}:${parcel.version}`, {
    subject: `${parcel.code} has been cancelled`,
    lead: `Your ${what(parcel)} from ${shopOf(parcel)}`,
    large: ['The parcel has been cancelled'],
    paragraphs: [`Nothing will be shipped. Ask ${shopOf(parcel)} if you did not expect this.`],
    facts: [['Parcel', parcel.code]],
    button: arrivalPage(parcel),
    because: becauseBuyer(parcel),
  });
}

/** One mail takes the event back: where leaving the run has just written one, that is replaced by this. */
async function tellBuyerOff(deps: Deps, parcel: Parcel, key: string, parts: LetterParts): Promise<void> {
  const unsent = await takeBackMails(deps.db, cancelKey(parcel));
  const gone = await cancelEvent(deps, { kind: 'arrival', id: parcel.id }, parcel.buyer);
  await writeMail(deps, key, parcel.buyer, parts, gone ?? unsent.at(-1) ?? null);
}

/** How the keys of mails end that take an arrival out of its buyer's calendar because of a run. */
const cancelKey = (parcel: Parcel): string => `:arrival-off-${parcel.id}:to-${parcel.buyer.id}`;

/** The buyer said which mornings suit: the breeder hears. */
export async function morningsSaid(deps: Deps, parcel: Parcel): Promise<void> {
  await writeMail(
    deps,
    `mornings-said:${parcel.id}:${parcel.version}`,
    await personOf(deps, parcel.breeder.id),
    {
      subject: `${parcel.code}: mornings that suit the buyer`,
      lead: `${parcel.buyer.name} has said of ${parcel.code}`,
      large: ['Which mornings suit'],
      paragraphs: [`${what(parcel)} to ${parcel.destination.city}, ${parcel.destination.state}.`],
      facts: parcel.mornings.map((m) => [longDate(m.date), m.suits ? 'suits' : 'does not suit'] as const),
      button: parcelPage(deps, parcel),
      because: becauseBreeder,
    },
  );
}

const outcomes: Readonly<Record<string, string>> = {
  'arrived-well': 'Arrived well',
  'arrived-weak': 'Arrived, but weak',
  doa: 'Dead on arrival',
  'not-arrived': 'Has not arrived',
};

/** The buyer reported how it arrived: the breeder hears, with their words. */
export async function arrivalReported(deps: Deps, parcel: Parcel, token: string): Promise<void> {
  const { report } = await deps.services.arrivals.byToken(token);
  const outcome = outcomes[report?.outcome ?? ''] ?? 'Reported';
  await writeMail(
    deps,
    `arrival-reported:${parcel.id}:${parcel.version}`,
    await personOf(deps, parcel.breeder.id),
    {
      subject: `${parcel.code}: ${outcome.toLowerCase()}`,
      lead: `${parcel.buyer.name} reports of ${parcel.code}`,
      large: [outcome],
      paragraphs: report?.text ? [`“${report.text}”`] : [],
      facts: [
        ['Animal', what(parcel)],
        ...(parcel.arrivalDate ? [['Arrival', dateLines(parcel.arrivalDate).join(', ')] as const] : []),
      ],
      button: parcelPage(deps, parcel),
      because: becauseBreeder,
    },
  );
}
