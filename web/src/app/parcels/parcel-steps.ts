import type { Parcel, Role } from '@shared/contract';
import { canMoveParcel } from '@shared/states/parcel-moves';

/** Who looks at a parcel. */
export interface Viewer {
  readonly id: number;
  readonly roles: readonly Role[];
}

/** What this person can do with the parcel now; the API refuses everything else in its own words. */
export interface ParcelSteps {
  readonly canChooseDay: boolean;
  readonly canTakeOffDay: boolean;
  readonly canPack: boolean;
  readonly canUnpack: boolean;
  readonly canClose: boolean;
  readonly canCancel: boolean;
  readonly canEdit: boolean;
  readonly canTrack: boolean;
}

/** The steps open to a person, from the one table of allowed moves and the rules of who books (design section 6). */
export function parcelSteps(
  { state, breeder }: Pick<Parcel, 'state' | 'breeder'>,
  viewer: Viewer,
): ParcelSteps {
  const mayBook = viewer.roles.includes('coordinator') || viewer.id === breeder.id;
  const isBeforePacking = ['draft', 'seeking', 'booked', 'on-hold'].includes(state);
  return {
    canChooseDay: mayBook && isBeforePacking,
    canTakeOffDay: mayBook && ['seeking', 'booked', 'on-hold'].includes(state),
    canPack: canMoveParcel(state, 'packed'),
    canUnpack: state === 'packed',
    canClose: canMoveParcel(state, 'closed'),
    canCancel: canMoveParcel(state, 'cancelled'),
    canEdit: !['closed', 'cancelled'].includes(state),
    canTrack: ['packed', 'aboard', 'handed-over', 'arrived'].includes(state),
  };
}
