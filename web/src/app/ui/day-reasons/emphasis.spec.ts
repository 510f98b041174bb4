import { emphasis } from './emphasis';

const bold = (sentence: string) =>
  emphasis(sentence)
    .filter((piece) => piece.isNumber)
    .map((piece) => piece.text);

describe('the numbers of a reason', () => {
  it.each([
    [
      'Flagstaff falls to 35 °F at 5 am Wednesday, 2.5 °F under the limit of 38 °F.',
      ['35 °F', '2.5 °F', '38 °F'],
    ],
    ['Boston falls to -4 °C.', ['-4 °C']],
    ['Outdoors it stays between 42 and 58 °F along the route.', ['42 and 58 °F']],
    ['Use one 40-hour heat pack.', ['40-hour']],
    ['The forecast is 14 h old; a forecast 3 days ahead is often off.', ['14 h', '3 days']],
    ['The parcel is ready from Monday, December 7.', []],
  ])('are picked out of "%s"', (sentence, expected) => {
    expect(bold(sentence)).toEqual(expected);
  });

  it('leave the sentence as it was', () => {
    const sentence = 'Use one 40-hour heat pack: it falls to 35 °F.';
    expect(
      emphasis(sentence)
        .map((piece) => piece.text)
        .join(''),
    ).toBe(sentence);
  });
});
