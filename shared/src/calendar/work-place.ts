import type { WorkPlace } from './is-working-day';

interface CounterDays {
  readonly id: number;
  readonly workingDays: readonly number[];
  readonly carrierId: number;
  readonly state: string;
}

/** A counter as a place whose days count. */
export const counterPlace = ({ id, workingDays, carrierId, state }: CounterDays): WorkPlace => ({
  workingDays,
  carrierId,
  state,
  counterId: id,
});

const mondayToFriday = [1, 2, 3, 4, 5];

/** A buyer's door: the carrier comes Monday to Friday, and no counter's own blackout concerns it. Assumption. */
export const doorPlace = (carrierId: number, state: string): WorkPlace => ({
  workingDays: mondayToFriday,
  carrierId,
  state,
  counterId: null,
});
