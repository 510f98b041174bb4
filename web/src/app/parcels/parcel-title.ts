import type { Parcel } from '@shared/contract';
import { contentsText } from '@shared/parcels/contents-text';

/** `1 corn snake to Flagstaff, AZ`. */
export const parcelTitle = ({ contents, destination }: Pick<Parcel, 'contents' | 'destination'>): string =>
  `${contentsText(contents)} to ${destination.city}, ${destination.state}`;
