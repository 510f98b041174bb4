import type { Verdict } from '@shared/contract';
import { rowGeometry, stripGeometry, stripScale, stripTicks, wrapWords } from './strip-geometry';

const day = (verdict: Verdict, outdoor: [number, number] | null, inBox: [number, number] | null = null) => ({
  verdict,
  outdoor: outdoor && { lowF: outdoor[0], highF: outdoor[1] },
  inBox: inBox && { lowF: inBox[0], highF: inBox[1] },
});
const band = { lowF: 60, highF: 85 };

describe('the scale', () => {
  it('holds everything drawn with some room, in whole fives', () => {
    // 38 − 4 = 34 → 30; 85 + 4 = 89 → 90
    expect(stripScale([day('open', [38, 57])], band)).toEqual({ lowF: 30, highF: 90 });
  });
  it('is an ordinary winter when nothing is known', () => {
    expect(stripScale([day('far', null)], null)).toEqual({ lowF: 20, highF: 90 });
  });
});

describe('the lines of the scale', () => {
  it('names the band and keeps round numbers clear of it', () => {
    // Clearance is 70/12 = 5.8 °F: 60 is an edge itself and 80 too near to 85.
    const labels = stripTicks({ lowF: 20, highF: 90 }, band, 'F').map((tick) => tick.label);
    expect(labels).toEqual(['60°', '85°', '20°', '40°']);
  });
  it('steps in whole degrees of the unit', () => {
    // 32 °F is 0 °C and 104 °F is 40 °C; 72 °F of scale are 40 °C, in steps of 10.
    const ticks = stripTicks({ lowF: 32, highF: 104 }, null, 'C');
    expect(ticks.map((tick) => tick.label)).toEqual(['0°', '10°', '20°', '30°', '40°']);
    expect(ticks.map((tick) => tick.valueF)).toEqual([32, 50, 68, 86, 104]);
  });
});

describe('the wide picture', () => {
  // Scale 20..90 over 140 px: 2 px a degree, warm is up.
  const frame = { width: 1040, left: 40, top: 60, bottom: 200 };
  const picture = stripGeometry(
    [day('open', [24, 50], [66, 79]), day('far', null), day('tight', [40, 40])],
    { lowF: 60, highF: 84 },
    'F',
    frame,
  );
  it('draws the band as a zone', () => {
    // y(84) = 200 − 64·2 = 72; 24 degrees are 48 px
    expect(picture.band).toEqual({ start: 72, length: 48 });
  });
  it('draws the ranges as bars', () => {
    // y(50) = 140, 26 degrees are 52 px; y(79) = 82, 13 degrees are 26 px
    expect(picture.columns[0]).toMatchObject({
      outdoor: { start: 140, length: 52 },
      inBox: { start: 82, length: 26 },
    });
  });
  it('draws nothing where nothing is known', () => {
    expect(picture.columns[1]).toMatchObject({ outdoor: null, inBox: null });
  });
  it('still shows a range of no degrees', () => {
    // y(40) = 160, widened to 4 px around it
    expect(picture.columns[2]?.outdoor).toEqual({ start: 158, length: 4 });
  });
  it('gives every day the same width', () => {
    expect(picture.columns.map((column) => Math.round(column.x))).toEqual([40, 373, 707]);
  });
  it('bears having no days', () => {
    expect(stripGeometry([], null, 'F', frame).columns).toEqual([]);
  });
});

describe('the narrow picture', () => {
  it('runs temperature across, cold at the left', () => {
    // Scale 20..90: 55 is the middle, 20 degrees are 2/7 of the width.
    const picture = rowGeometry([day('open', [24, 55])], { lowF: 60, highF: 85 }, 'F');
    expect(picture.rows[0]?.outdoor?.start).toBeCloseTo((4 / 70) * 100, 6);
    expect(picture.rows[0]?.outdoor?.length).toBeCloseTo((31 / 70) * 100, 6);
    expect(picture.band?.start).toBeCloseTo((40 / 70) * 100, 6);
  });
});

describe('wrapWords', () => {
  it.each([
    ['no Saturday hold', 9, ['no', 'Saturday', 'hold']],
    ['too soon', 9, ['too soon']],
    ['', 9, []],
    ['one two three four five', 5, ['one', 'two', 'three…']],
  ])('%s in %d characters', (text, characters, lines) => {
    expect(wrapWords(text, characters)).toEqual(lines);
  });
});
