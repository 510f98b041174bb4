/** A parcel of the demo circle: whose, for whom, what is in which box. The hold counter is the one in the buyer's city. */
export interface ParcelSeed {
  readonly breeder: string;
  readonly buyer: string;
  readonly contents: readonly (readonly [species: string, quantity: number])[];
  readonly box: 'Small box' | 'Medium box' | 'Large box';
}

const hanna = 'breeder@example.org';
const marco = 'marco@example.org';
const tomas = 'tomas@example.org';
const june = 'june@example.org';
const priya = 'priya@example.org';
const walt = 'walt@example.org';

const parcel = (
  breeder: string,
  buyer: string,
  contents: ParcelSeed['contents'],
  box: ParcelSeed['box'],
): ParcelSeed => ({ breeder, buyer: `${buyer}@example.org`, contents, box });

/** Arrived and closed, a week and more ago. */
export const closedParcels: readonly ParcelSeed[] = [
  parcel(walt, 'theo', [['boa', 1]], 'Large box'),
  parcel(june, 'bea', [['kingsnake', 2]], 'Small box'),
];

/** Of the last run: the first two are reported arrived, the third is not yet heard of. */
export const arrivedParcels: readonly ParcelSeed[] = [
  parcel(hanna, 'buyer', [['corn snake', 1]], 'Medium box'),
  parcel(priya, 'fay', [['bearded dragon', 1]], 'Medium box'),
  parcel(tomas, 'rosa', [['leopard gecko', 3]], 'Small box'),
];

/** Aboard the run that is underway. */
export const aboardParcels: readonly ParcelSeed[] = [
  parcel(hanna, 'tess', [['kingsnake', 1]], 'Small box'),
  parcel(marco, 'sam', [['ball python', 1]], 'Medium box'),
];

/** Waiting for their days: two runs, a day of one's own, one on hold and five left open are made from these, in order. */
export const comingParcels: readonly ParcelSeed[] = [
  parcel(hanna, 'buyer', [['corn snake', 2]], 'Medium box'),
  parcel(tomas, 'ellis', [['crested gecko', 2]], 'Small box'),
  parcel(priya, 'sofia', [['bearded dragon', 1]], 'Medium box'),
  parcel(june, 'gus', [['kingsnake', 1]], 'Small box'),
  parcel(marco, 'mei', [['ball python', 1]], 'Medium box'),
  parcel(walt, 'abby', [['boa', 1]], 'Large box'),
  parcel(hanna, 'kenji', [['leopard gecko', 1]], 'Small box'),
  parcel(tomas, 'luis', [['leopard gecko', 2]], 'Small box'),
  parcel(priya, 'ivo', [['blue-tongued skink', 1]], 'Medium box'),
  parcel(
    hanna,
    'dana',
    [
      ['corn snake', 1],
      ['kingsnake', 1],
    ],
    'Medium box',
  ),
  parcel(june, 'carmen', [['ball python', 2]], 'Medium box'),
  parcel(walt, 'theo', [['boa', 1]], 'Large box'),
  parcel(marco, 'piet', [['corn snake', 1]], 'Medium box'),
  parcel(tomas, 'nils', [['leopard gecko', 1]], 'Small box'),
];

/** Entered, no day chosen yet. */
export const draftParcels: readonly ParcelSeed[] = [
  parcel(hanna, 'hugo', [['corn snake', 1]], 'Medium box'),
  parcel(june, 'lena', [['kingsnake', 1]], 'Small box'),
  parcel(priya, 'oskar', [['blue-tongued skink', 1]], 'Large box'),
];

export const cancelledParcel: ParcelSeed = parcel(walt, 'luis', [['boa', 1]], 'Large box');
