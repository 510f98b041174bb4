import { endMinuteOf, minuteOf, timeText } from './time-text';

describe('a time field', () => {
  it.each<[number, string]>([
    [0, '00:00'],
    [545, '09:05'],
    [990, '16:30'],
    [1440, '00:00'],
  ])('shows minute %d as %s', (minute, text) => expect(timeText(minute)).toBe(text));
  it('shows nothing for no time', () => expect(timeText(null)).toBe(''));

  it('reads minutes after midnight', () => {
    expect(minuteOf('16:30')).toBe(990);
    expect(minuteOf('16:30:00')).toBe(990);
    expect(minuteOf('')).toBeNull();
  });
  it('reads midnight at the end of a span as the end of the day', () => {
    expect(endMinuteOf('00:00')).toBe(1440);
    expect(endMinuteOf('18:00')).toBe(1080);
  });
});
