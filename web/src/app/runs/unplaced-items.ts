import type { Parcel, Unplaced } from '@shared/contract';
import { dayLabel } from '../core/dates';

/** A parcel without a run, and why, in words. */
export interface UnplacedItem {
  readonly id: number;
  readonly title: string;
  readonly text: string;
  readonly help: string | null;
  readonly parcel: Parcel | null;
}

/**
 * The parcels that wait, each with the pooling's reason when it has spoken, and with its own state otherwise. What is
 * booked on a day without a run comes first: its day is set.
 */
export function unplacedItems(waiting: readonly Parcel[], spoken: readonly Unplaced[]): UnplacedItem[] {
  const reasons = new Map(spoken.map((entry) => [entry.parcelId, entry]));
  const known = new Set(waiting.map((parcel) => parcel.id));
  const own = waiting
    .filter((parcel) => parcel.run === null)
    .toSorted(
      (a, b) => (a.shipDate ?? '9999').localeCompare(b.shipDate ?? '9999') || a.code.localeCompare(b.code),
    )
    .map((parcel) => fromParcel(parcel, reasons.get(parcel.id) ?? null));
  const others = spoken
    .filter((entry) => !known.has(entry.parcelId))
    .map((entry) => ({
      id: entry.parcelId,
      title: `${entry.code} to ${entry.destination}`,
      text: entry.text,
      help: entry.help,
      parcel: null,
    }));
  return [...own, ...others];
}

function fromParcel(parcel: Parcel, reason: Unplaced | null): UnplacedItem {
  return {
    id: parcel.id,
    title: `${parcel.code} to ${parcel.destination.city}, ${parcel.destination.state}`,
    text: reason?.text ?? ownText(parcel),
    help: reason?.help ?? null,
    parcel,
  };
}

function ownText(parcel: Parcel): string {
  if (parcel.state === 'on-hold') return parcel.holdReason ?? 'On hold.';
  if (parcel.shipDate) return `Booked for ${dayLabel(parcel.shipDate, 'medium')}. No run takes it yet.`;
  if (parcel.flexible)
    return `Day left open, ${dayLabel(parcel.flexible.from, 'short')} to ${dayLabel(parcel.flexible.to, 'short')}.`;
  return 'Waits for a day.';
}
