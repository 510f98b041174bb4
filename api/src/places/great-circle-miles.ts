interface Position {
  readonly lat: number;
  readonly lon: number;
}

/** Mean Earth radius (IUGG), 6371.0088 km, in statute miles of 1.609344 km. */
const earthRadiusMiles = 6371.0088 / 1.609344;
const radians = (degrees: number) => (degrees * Math.PI) / 180;

/** Great-circle distance in statute miles by the haversine formula; within 0.6 % of the ellipsoid's. */
export function greatCircleMiles(a: Position, b: Position): number {
  const halfLat = Math.sin(radians(b.lat - a.lat) / 2);
  const halfLon = Math.sin(radians(b.lon - a.lon) / 2);
  const h = halfLat ** 2 + Math.cos(radians(a.lat)) * Math.cos(radians(b.lat)) * halfLon ** 2;
  return 2 * earthRadiusMiles * Math.asin(Math.min(1, Math.sqrt(h)));
}
