const dayMs = 86_400_000;

/** Days from 1970-01-01 to a plain date `YYYY-MM-DD`, in the proleptic Gregorian calendar; no zone is involved. */
export function dayNumber(date: string): number {
  return Date.UTC(Number(date.slice(0, 4)), Number(date.slice(5, 7)) - 1, Number(date.slice(8, 10))) / dayMs;
}

/** The plain date of a day number; the inverse of `dayNumber`. */
export function fromDayNumber(day: number): string {
  return new Date(day * dayMs).toISOString().slice(0, 10);
}
