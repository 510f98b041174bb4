/** `in 97 of 100 forecasts like this one`; near certainty is never called certain. */
export function chanceText(chance: number): string {
  if (chance > 0.995) return 'in more than 99 of 100 forecasts like this one';
  if (chance < 0.005) return 'in fewer than 1 of 100 forecasts like this one';
  return `in ${Math.round(chance * 100)} of 100 forecasts like this one`;
}
