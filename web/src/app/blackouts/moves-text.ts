import type { BlackoutPreview } from '@shared/contract';

const counted = (count: number, one: string): string => `${count} ${one}${count === 1 ? '' : 's'}`;

/** What saving would do, in one or two sentences. */
export function movesText({ days, parcels, runs }: BlackoutPreview, isRemoval: boolean): string {
  if (isRemoval && parcels.length === 0)
    return 'Its days open again. Nothing booked moves; parcels already on hold stay so until somebody books them.';
  const closes =
    days.length === 0 ? 'No day of the coming year is closed.' : `${counted(days.length, 'day')} closed.`;
  if (parcels.length === 0) return `${closes} Nothing that is booked moves.`;
  const lose = `${counted(parcels.length, 'parcel')} ${parcels.length === 1 ? 'loses its day' : 'lose their day'}`;
  const change = `${counted(runs.length, 'run')} ${runs.length === 1 ? 'changes' : 'change'}`;
  return `${closes} ${lose}${runs.length > 0 ? `, ${change}` : ''}.`;
}

/** The button that goes on says what it does. */
export function yesText({ parcels }: BlackoutPreview, isRemoval: boolean): string {
  const verb = isRemoval ? 'Remove' : 'Save';
  return parcels.length === 0 ? verb : `${verb} and put ${counted(parcels.length, 'parcel')} on hold`;
}
