import { sketchMap, type MapPlace } from './run-map-geometry';

const size = { width: 400, height: 300, padding: 30 };
const place = (kind: MapPlace['kind'], lat: number, lon: number): MapPlace => ({
  kind,
  name: `${lat} ${lon}`,
  lat,
  lon,
});

describe('the run sketch map', () => {
  it('keeps every place inside the padding, north up and east to the right', () => {
    const sketch = sketchMap(
      [place('start', 29.4, -98.5), place('stop', 29.8, -98.7), place('counter', 29.5, -98.3)],
      size,
    );
    for (const point of sketch.points) {
      expect(point.x).toBeGreaterThanOrEqual(30);
      expect(point.x).toBeLessThanOrEqual(370);
      expect(point.y).toBeGreaterThanOrEqual(30);
      expect(point.y).toBeLessThanOrEqual(270);
    }
    const [start, stop, counter] = sketch.points;
    expect(stop?.y).toBeLessThan(start?.y ?? 0);
    expect(counter?.x).toBeGreaterThan(start?.x ?? 400);
  });

  it('numbers the stops in road order and joins all places', () => {
    const sketch = sketchMap(
      [
        place('start', 29.4, -98.5),
        place('stop', 29.8, -98.7),
        place('stop', 29.7, -98.1),
        place('counter', 29.5, -98.3),
      ],
      size,
    );
    expect(sketch.points.map((point) => point.seq)).toEqual([0, 1, 2, 0]);
    expect(sketch.path.match(/[ML]/g)).toEqual(['M', 'L', 'L', 'L']);
  });

  it('draws a degree of longitude shorter than one of latitude: by the cosine of 60°, half', () => {
    const sketch = sketchMap(
      [place('start', 59.5, -100), place('stop', 60.5, -100), place('counter', 60, -99)],
      size,
    );
    const [south, north, east] = sketch.points;
    const height = (south?.y ?? 0) - (north?.y ?? 0);
    const width = (east?.x ?? 0) - (south?.x ?? 0);
    expect(width / height).toBeCloseTo(0.5, 2);
  });

  it('does not blow a single place up, and has nothing to say about none', () => {
    const one = sketchMap([place('stop', 29.4, -98.5)], size);
    expect(one.points[0]).toMatchObject({ x: 200, y: 150 });
    expect(sketchMap([], size).points).toEqual([]);
  });

  it('moves a label that would cover another', () => {
    const sketch = sketchMap(
      [place('stop', 29.4, -98.5), place('stop', 29.4001, -98.5001), place('counter', 29.9, -98.9)],
      size,
    );
    const [first, second] = sketch.points;
    expect(Math.abs((first?.labelY ?? 0) - (second?.labelY ?? 0))).toBeGreaterThanOrEqual(16);
  });

  it('keeps a label off the marker of another place', () => {
    const sketch = sketchMap(
      [
        { ...place('start', 29.541, -98.554), name: 'start' },
        { ...place('stop', 29.8825, -97.941), name: 'San Marcos' },
        { ...place('stop', 29.35, -98.88), name: 'Castroville' },
        { ...place('counter', 29.534, -98.47), name: 'Airport counter' },
      ],
      { width: 480, height: 320, padding: 40 },
    );
    const [start, , , counter] = sketch.points;
    expect(start?.anchor === 'end' || Math.abs((start?.labelY ?? 0) - (counter?.y ?? 0) - 5) >= 17).toBe(
      true,
    );
  });

  it('points an arrow along each leg: east is 0°, south 90° on a screen', () => {
    const sketch = sketchMap(
      [place('start', 29.5, -98.5), place('stop', 29.5, -98.1), place('counter', 29.2, -98.1)],
      size,
    );
    expect(sketch.arrows.map(({ angle }) => angle)).toEqual([0, 90]);
  });

  it('draws the lines of round degrees where such places lie', () => {
    const sketch = sketchMap([place('start', 29, -99), place('counter', 30, -98)], size);
    const [start] = sketch.points;
    expect(sketch.grid).toContain(`M0 ${start?.y}H400`);
    expect(sketch.grid).toContain(`M${start?.x} 0V300`);
  });

  it('gives a scale of round miles that is no longer than a third of the picture', () => {
    const { scale } = sketchMap([place('start', 29.4, -98.5), place('counter', 29.8, -98.1)], size);
    expect([1, 2, 5, 10, 20, 50]).toContain(scale.miles);
    expect(scale.length).toBeLessThanOrEqual((400 - 60) / 3);
  });
});
