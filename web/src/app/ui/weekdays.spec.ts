import { weekdaysText, weekText } from './weekdays';

describe('weekdays in words', () => {
  it.each<[number[], string]>([
    [[1, 2, 3, 4, 5], 'Mon–Fri'],
    [[6, 5, 1], 'Mon, Fri, Sat'],
    [[7, 1, 2, 3], 'Mon–Wed, Sun'],
    [[1, 2, 3, 4, 5, 6, 7], 'every day'],
    [[], 'no day'],
  ])('%j is %s', (days, text) => expect(weekdaysText(days)).toBe(text));
});

describe('a week of times', () => {
  it('draws neighbors with the same time together', () => {
    const times: Record<number, string> = {
      1: '4:30 PM',
      2: '4:30 PM',
      3: '4:30 PM',
      5: '4:30 PM',
      6: '12:00 PM',
    };
    expect(weekText((iso) => times[iso] ?? null)).toBe('Mon–Wed 4:30 PM, Fri 4:30 PM, Sat 12:00 PM');
  });
  it('says nothing about a week without times', () => expect(weekText(() => null)).toBe(''));
});
