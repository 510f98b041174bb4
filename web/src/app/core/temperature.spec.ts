import { degrees, rangeText, sentenceInUnit, temperatureText } from './temperature';

// Celsius by hand from C = (F − 32) · 5/9; a difference is F · 5/9 alone.
describe('temperatures in the unit of the person', () => {
  it.each([
    [32, 0],
    [212, 100],
    [-40, -40],
    [70, 21],
  ])('%d °F are %d °C', (valueF, valueC) => {
    expect(degrees(valueF, 'C')).toBe(valueC);
    expect(temperatureText(valueF, 'F')).toBe(`${valueF} °F`);
  });

  it('writes a range with its unit once', () => {
    expect(rangeText({ lowF: 59, highF: 86 }, 'C')).toBe('15 to 30 °C');
  });
});

describe('a sentence of the API read in °C', () => {
  it.each([
    ['The high along the route falls under 70 °F.', 'The high along the route falls under 21 °C.'],
    ['The box stays between 59 and 86 °F.', 'The box stays between 15 and 30 °C.'],
    [
      'Boston falls to 41 °F, only 3 °F above the limit of 38 °F; a forecast 1 day ahead is often 3.8 °F off.',
      'Boston falls to 5 °C, only 1.7 °C above the limit of 3 °C; a forecast 1 day ahead is often 2.1 °C off.',
    ],
    ['It stays at least 9 °F inside the limits.', 'It stays at least 5 °C inside the limits.'],
    ['Duluth falls to -4 °F.', 'Duluth falls to -20 °C.'],
  ])('"%s"', (sentence, expected) => {
    expect(sentenceInUnit(sentence, 'C')).toBe(expected);
    expect(sentenceInUnit(sentence, 'F')).toBe(sentence);
  });
});
