/** A place of the sketch map. */
export interface MapPlace {
  readonly kind: 'start' | 'stop' | 'counter';
  readonly name: string;
  readonly lat: number;
  readonly lon: number;
}

export interface MapSize {
  readonly width: number;
  readonly height: number;
  readonly padding: number;
}

export interface MapPoint extends MapPlace {
  readonly x: number;
  readonly y: number;
  /** Road order of a stop, 1 first; 0 for the start and the counter. */
  readonly seq: number;
  readonly labelX: number;
  readonly labelY: number;
  readonly anchor: 'start' | 'end';
}

export interface MapSketch {
  readonly points: readonly MapPoint[];
  /** SVG path through the places in road order. */
  readonly path: string;
  readonly scale: { readonly miles: number; readonly length: number };
}

/** Miles of a degree of latitude near 30° north: 110.85 km on WGS 84. */
const milesPerDegree = 68.88;
/** Room for a label's line of text, in drawing units. */
const lineHeight = 17;
const niceMiles = [1, 2, 5, 10, 20, 50, 100, 200, 500];

/**
 * Places to a sketch: equirectangular about the middle latitude, both axes with the same scale, in the order given
 * (start, stops in road order, counter). Right for the extent of a day's drive, not for a continent.
 */
export function sketchMap(places: readonly MapPlace[], size: MapSize): MapSketch {
  if (places.length === 0) return { points: [], path: '', scale: { miles: 0, length: 0 } };
  const flat = flatten(places);
  const minX = Math.min(...flat.map((p) => p.x));
  const minY = Math.min(...flat.map((p) => p.y));
  const spanX = Math.max(...flat.map((p) => p.x)) - minX;
  const spanY = Math.max(...flat.map((p) => p.y)) - minY;
  const innerWidth = size.width - 2 * size.padding;
  const innerHeight = size.height - 2 * size.padding;
  // Two miles at least, so that a run of one neighborhood is not blown up to the whole picture.
  const unit = Math.min(innerWidth / Math.max(spanX, 2), innerHeight / Math.max(spanY, 2));
  const left = size.padding + (innerWidth - spanX * unit) / 2;
  const top = size.padding + (innerHeight - spanY * unit) / 2;
  let seq = 0;
  const points = flat.map((p) => ({
    ...p.place,
    x: round(left + (p.x - minX) * unit),
    y: round(top + (p.y - minY) * unit),
    seq: p.place.kind === 'stop' ? ++seq : 0,
  }));
  return {
    points: labelled(points, size),
    path: points.map((p, index) => `${index === 0 ? 'M' : 'L'}${p.x} ${p.y}`).join(''),
    scale: scaleBar(unit, innerWidth),
  };
}

/** Positions in miles from the middle, y growing southward as SVG has it. */
function flatten(places: readonly MapPlace[]): { place: MapPlace; x: number; y: number }[] {
  const middle = (Math.min(...places.map((p) => p.lat)) + Math.max(...places.map((p) => p.lat))) / 2;
  const shrink = Math.cos((middle * Math.PI) / 180);
  return places.map((place) => ({
    place,
    x: place.lon * shrink * milesPerDegree,
    y: -place.lat * milesPerDegree,
  }));
}

type Bare = Omit<MapPoint, 'labelX' | 'labelY' | 'anchor'>;

/** Labels sit beside their point, inward from the nearer edge; one that would cover an earlier one moves down. */
function labelled(points: readonly Bare[], size: MapSize): MapPoint[] {
  const taken: { x: number; y: number }[] = [];
  return points.map((point) => {
    const anchor = point.x > size.width * 0.6 ? ('end' as const) : ('start' as const);
    const labelX = anchor === 'start' ? point.x + 20 : point.x - 20;
    let labelY = point.y + 5;
    while (taken.some((other) => Math.abs(other.y - labelY) < lineHeight && Math.abs(other.x - labelX) < 130))
      labelY += lineHeight;
    if (labelY > size.height - 6) labelY = size.height - 6;
    taken.push({ x: labelX, y: labelY });
    return { ...point, labelX, labelY, anchor };
  });
}

/** The longest round number of miles that takes a third of the width at most. */
function scaleBar(unit: number, innerWidth: number): { miles: number; length: number } {
  const fitting = niceMiles.filter((miles) => miles * unit <= innerWidth / 3);
  const miles = fitting.at(-1) ?? niceMiles[0] ?? 1;
  return { miles, length: round(miles * unit) };
}

const round = (value: number): number => Math.round(value * 10) / 10;
