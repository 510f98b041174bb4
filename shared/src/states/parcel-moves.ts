import type { ParcelState } from '../contract/parcels';

/**
 * The allowed moves of a parcel, as data: the API refuses any other and the buttons offer no other.
 * `seeking` waits for a day inside its span; `on-hold` was taken off its day by a recheck or a blackout.
 */
export const parcelMoves: Readonly<Record<ParcelState, readonly ParcelState[]>> = {
  draft: ['seeking', 'booked', 'cancelled'],
  seeking: ['booked', 'draft', 'on-hold', 'cancelled'],
  booked: ['packed', 'seeking', 'draft', 'aboard', 'on-hold', 'cancelled'],
  packed: ['booked', 'aboard', 'on-hold', 'cancelled'],
  aboard: ['handed-over', 'booked', 'on-hold'],
  'handed-over': ['arrived', 'closed'],
  arrived: ['closed'],
  closed: [],
  'on-hold': ['booked', 'seeking', 'draft', 'cancelled'],
  cancelled: [],
};

/** Whether a parcel may go from one state to another; staying put is not a move. */
export const canMoveParcel = (from: ParcelState, to: ParcelState): boolean => parcelMoves[from].includes(to);
