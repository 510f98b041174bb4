import { bandX } from './band-bar';

describe('a temperature on the band bar', () => {
  // The scale runs from 30 to 110 °F over 320 units: 4 units a degree.
  it('stands by the scale', () => {
    expect(bandX(30)).toBe(0);
    expect(bandX(70)).toBe(160);
    expect(bandX(110)).toBe(320);
  });
  it('stands at the end when it lies beyond', () => {
    expect(bandX(-10)).toBe(0);
    expect(bandX(130)).toBe(320);
  });
});
