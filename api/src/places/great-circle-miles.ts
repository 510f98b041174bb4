import { haversineKm, kmPerMile } from '@shared/pooling/travel';

/** Great-circle distance in statute miles by the haversine formula; within 0.6 % of the ellipsoid's. */
export const greatCircleMiles = (
  a: { readonly lat: number; readonly lon: number },
  b: { readonly lat: number; readonly lon: number },
): number => haversineKm(a, b) / kmPerMile;
