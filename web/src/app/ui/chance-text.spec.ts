import { chanceNumber, chanceText } from './chance-text';

describe('a chance in words', () => {
  it.each([
    [0.971, 'in 97 of 100 forecasts like this one', '97 of 100'],
    [0.5, 'in 50 of 100 forecasts like this one', '50 of 100'],
    [0.999, 'in more than 99 of 100 forecasts like this one', '99+ of 100'],
    [1, 'in more than 99 of 100 forecasts like this one', '99+ of 100'],
    [0, 'in fewer than 1 of 100 forecasts like this one', '<1 of 100'],
  ])('%d is counted in forecasts', (chance, sentence, short) => {
    expect(chanceText(chance)).toBe(sentence);
    expect(chanceNumber(chance)).toBe(short);
  });
});
