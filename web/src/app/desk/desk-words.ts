import type { Desk } from '@shared/contract';

/** How many matters need somebody. */
export const matterCount = (desk: Desk | null): number =>
  desk ? desk.failedMail.length + desk.runs.length + desk.parcels.length + desk.forecasts.length : 0;

/** The state of the desk in a sentence. */
export function matterText(desk: Desk): string {
  const count = matterCount(desk);
  if (count === 0) return 'Nothing waits for you.';
  return count === 1 ? 'One matter needs somebody.' : `${count} matters need somebody.`;
}

/** What is as it should be, while something else is not: `Mail and forecasts are as they should be.` */
export function quietText(desk: Desk | null): string {
  if (!desk) return '';
  const quiet = [
    ...(desk.failedMail.length === 0 ? ['mail'] : []),
    ...(desk.runs.length === 0 ? ['runs'] : []),
    ...(desk.parcels.length === 0 ? ['parcels'] : []),
    ...(desk.forecasts.length === 0 ? ['forecasts'] : []),
  ];
  if (quiet.length === 0) return '';
  const last = quiet.at(-1) ?? '';
  const words = quiet.length === 1 ? last : `${quiet.slice(0, -1).join(', ')} and ${last}`;
  const verb = words === 'mail' ? 'is as it' : 'are as they';
  return `${words[0]?.toUpperCase() ?? ''}${words.slice(1)} ${verb} should be.`;
}

export interface DeskCount {
  readonly label: string;
  readonly value: number;
  readonly icon: string;
  /** The page behind it, when there is one. */
  readonly link: string | null;
}

/** The circle in numbers. */
export function deskCounts(desk: Desk | null): readonly DeskCount[] {
  if (!desk) return [];
  return [
    { label: 'people', value: desk.counts.people, icon: 'people', link: '/people' },
    { label: 'open parcels', value: desk.counts.parcels, icon: 'parcel', link: '/parcels' },
    { label: 'coming runs', value: desk.counts.runs, icon: 'van', link: '/runs' },
    { label: 'mails waiting to go out', value: desk.mailWaiting, icon: 'mail', link: null },
  ];
}
