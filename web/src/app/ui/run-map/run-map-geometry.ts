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
  /** The middle of each leg and where it leads, in degrees clockwise from east as SVG turns. */
  readonly arrows: readonly { readonly x: number; readonly y: number; readonly angle: number }[];
  /** SVG path of the meridians and parallels at round degrees, so that north and distance can be read. */
  readonly grid: string;
  readonly scale: { readonly miles: number; readonly length: number };
}

/** Miles of a degree of latitude near 30° north: 110.85 km on WGS 84. */
const milesPerDegree = 68.88;
/** Room for a label's line of text, in drawing units. */
const lineHeight = 17;
/** How far a marker reaches from its middle, in drawing units. */
const markerReach = 14;
const letterWidth = 7.6;
const closestGrid = 70;
const shortestArrowLeg = 50;
const niceDegrees = [0.01, 0.02, 0.05, 0.1, 0.2, 0.25, 0.5, 1];
const niceMiles = [1, 2, 5, 10, 20, 50, 100, 200, 500];

/**
 * Places to a sketch: equirectangular about the middle latitude, both axes with the same scale, in the order given
 * (start, stops in road order, counter). Right for the extent of a day's drive, not for a continent.
 */
export function sketchMap(places: readonly MapPlace[], size: MapSize): MapSketch {
  if (places.length === 0)
    return { points: [], path: '', arrows: [], grid: '', scale: { miles: 0, length: 0 } };
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
    arrows: arrowsOf(points),
    grid: gridOf(size, shrinkOf(places), { minX, minY, left, top, unit }),
    scale: scaleBar(unit, innerWidth),
  };
}

/** Legs too short for an arrow are left without. */
function arrowsOf(points: readonly Bare[]): MapSketch['arrows'] {
  return points.slice(1).flatMap((to, index) => {
    const from = points[index];
    if (!from || Math.hypot(to.x - from.x, to.y - from.y) < shortestArrowLeg) return [];
    return [
      {
        x: round((from.x + to.x) / 2),
        y: round((from.y + to.y) / 2),
        angle: round((Math.atan2(to.y - from.y, to.x - from.x) * 180) / Math.PI),
      },
    ];
  });
}

interface Frame {
  readonly minX: number;
  readonly minY: number;
  readonly left: number;
  readonly top: number;
  /** Drawing units a mile. */
  readonly unit: number;
}

/** Lines over the whole picture, at the closest round step that leaves some room between them. */
function gridOf(size: MapSize, shrink: number, { minX, minY, left, top, unit }: Frame): string {
  const perLon = shrink * milesPerDegree * unit;
  const perLat = milesPerDegree * unit;
  const step = niceDegrees.find((degrees) => degrees * perLon >= closestGrid) ?? 1;
  const westDegree = (minX - left / unit) / (shrink * milesPerDegree);
  const northDegree = -(minY - top / unit) / milesPerDegree;
  const lines: string[] = [];
  for (let k = Math.ceil(westDegree / step); (k * step - westDegree) * perLon <= size.width; k++)
    lines.push(`M${round((k * step - westDegree) * perLon)} 0V${size.height}`);
  for (let k = Math.floor(northDegree / step); (northDegree - k * step) * perLat <= size.height; k--)
    lines.push(`M0 ${round((northDegree - k * step) * perLat)}H${size.width}`);
  return lines.join('');
}

/** Positions in miles from the middle, y growing southward as SVG has it. */
function flatten(places: readonly MapPlace[]): { place: MapPlace; x: number; y: number }[] {
  const shrink = shrinkOf(places);
  return places.map((place) => ({
    place,
    x: place.lon * shrink * milesPerDegree,
    y: -place.lat * milesPerDegree,
  }));
}

/** How much shorter a degree of longitude is than one of latitude, at the middle of the places. */
function shrinkOf(places: readonly MapPlace[]): number {
  const middle = (Math.min(...places.map((p) => p.lat)) + Math.max(...places.map((p) => p.lat))) / 2;
  return Math.cos((middle * Math.PI) / 180);
}

type Bare = Omit<MapPoint, 'labelX' | 'labelY' | 'anchor'>;

interface Area {
  readonly left: number;
  readonly right: number;
  readonly y: number;
}

/**
 * Labels sit beside their point, inward from the nearer edge first; one that would cover a marker or an earlier label
 * goes to the other side, then up or down.
 */
function labelled(points: readonly Bare[], size: MapSize): MapPoint[] {
  const taken: Area[] = points.map(({ x, y }) => ({
    left: x - markerReach,
    right: x + markerReach,
    y: y + 5,
  }));
  return points.map((point, index) => {
    const others = taken.filter((_, at) => at !== index);
    const spots = labelSpots(point, size);
    const spot = spots.find(({ area }) => isFree(area, others, size)) ?? spots[0];
    if (!spot) throw new Error('A label has no spot at all.');
    taken.push(spot.area);
    return { ...point, labelX: spot.labelX, labelY: spot.area.y, anchor: spot.anchor };
  });
}

function labelSpots(point: Bare, size: MapSize): { labelX: number; anchor: 'start' | 'end'; area: Area }[] {
  const width = point.name.length * letterWidth;
  const sides = point.x > size.width * 0.6 ? (['end', 'start'] as const) : (['start', 'end'] as const);
  return [0, 1, -1, 2, -2, 3, -3].flatMap((lines) =>
    sides.map((anchor) => {
      const labelX = anchor === 'start' ? point.x + 20 : point.x - 20;
      const left = anchor === 'start' ? labelX : labelX - width;
      return { labelX, anchor, area: { left, right: left + width, y: point.y + 5 + lines * lineHeight } };
    }),
  );
}

const isFree = (area: Area, others: readonly Area[], size: MapSize): boolean =>
  area.left >= 4 &&
  area.right <= size.width - 4 &&
  area.y >= lineHeight &&
  area.y <= size.height - 6 &&
  others.every(
    (other) =>
      Math.abs(other.y - area.y) >= lineHeight || other.right <= area.left || area.right <= other.left,
  );

/** The longest round number of miles that takes a third of the width at most. */
function scaleBar(unit: number, innerWidth: number): { miles: number; length: number } {
  const fitting = niceMiles.filter((miles) => miles * unit <= innerWidth / 3);
  const miles = fitting.at(-1) ?? niceMiles[0] ?? 1;
  return { miles, length: round(miles * unit) };
}

const round = (value: number): number => Math.round(value * 10) / 10;
