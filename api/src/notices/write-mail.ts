import type { Parcel } from '@shared/contract';
import { contentsText } from '@shared/parcels/contents-text';
import type { Deps } from '../deps';
import { pageUrl } from './addresses';
import type { InvitationMessage } from './invitations';
import type { NoticeEvent } from './notices-service';
import { post } from './outbox';
import type { CalendarPart } from './outbox-queries';
import { letter, type LetterParts } from './templates/letter';
import { withoutOne } from './words';

export type Of<K extends NoticeEvent['kind']> = Extract<NoticeEvent, { kind: K }>;

export interface Addressee {
  readonly id: number;
  readonly name: string;
  readonly email: string;
}

const calendarNotes = {
  new: 'The invitation is attached: accept it, and your calendar follows every change by itself.',
  changed: 'The entry in your calendar changes with this mail.',
  gone: 'The entry leaves your calendar with this mail.',
} as const;

const noteOf = (message: InvitationMessage | CalendarPart): keyof typeof calendarNotes => {
  if (message.method === 'CANCEL') return 'gone';
  return 'isNew' in message && message.isNew ? 'new' : 'changed';
};

/** Writes one person's mail into the outbox; without `message` it carries no invitation. One key and person, one mail. */
export async function writeMail(
  deps: Deps,
  key: string,
  to: Addressee,
  parts: LetterParts,
  message: InvitationMessage | CalendarPart | null = null,
): Promise<void> {
  const note = message && calendarNotes[noteOf(message)];
  await post(deps, {
    key: `${key}:to-${to.id}`,
    to,
    letter: letter(note ? { ...parts, calendarNote: note } : parts),
    calendar: message && { method: message.method, text: message.text },
  });
}

/** "corn snake", "2 crested geckos, 1 corn snake". */
export const what = (parcel: Parcel): string => withoutOne(contentsText(parcel.contents));

export const shopOf = (parcel: Parcel): string => parcel.breeder.businessName ?? parcel.breeder.name;

export const tokenOf = (parcel: Parcel): string => parcel.arrivalUrl.split('/').at(-1) ?? '';

export const parcelPage = (deps: Deps, parcel: Parcel) => ({
  label: 'Open the parcel',
  url: pageUrl(deps.config, `/parcels/${parcel.id}`),
});

export const arrivalPage = (parcel: Parcel) => ({ label: 'See the arrival', url: parcel.arrivalUrl });

/** "Phoenix counter, Phoenix, AZ". */
export const placeOf = ({ destination }: Parcel): string =>
  `${destination.name}, ${destination.city}, ${destination.state}`;

export async function personOf(deps: Deps, id: number): Promise<Addressee> {
  const { name, email } = await deps.services.people.get(id);
  return { id, name, email };
}

export const becauseBuyer = (parcel: Parcel): string =>
  `You get this because ${shopOf(parcel)} ships an animal to you.`;
export const becauseBreeder = 'You get this because the parcel is yours.';
export const becauseOnRun = 'You get this because you are on this run.';
