/** Minutes after midnight as the value of a time field, `16:30`; an empty text for none. 1440 is midnight at the end, `00:00`. */
export function timeText(minute: number | null | undefined): string {
  if (minute === null || minute === undefined) return '';
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${two(Math.floor(minute / 60) % 24)}:${two(minute % 60)}`;
}

/** Minutes after midnight of a time field's value; null while it is empty or incomplete. */
export function minuteOf(text: string): number | null {
  const match = /^(\d{1,2}):(\d{2})/.exec(text);
  return match ? Number(match[1]) * 60 + Number(match[2]) : null;
}

/** Like `minuteOf`, for the end of a span: midnight is the end of the day, 1440. */
export function endMinuteOf(text: string): number | null {
  const minute = minuteOf(text);
  return minute === 0 ? 1440 : minute;
}
