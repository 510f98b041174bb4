/**
 * The letters in front of a parcel's running number, from the circle's name: `codePrefix('Hill Country circle')` is
 * "HC". "P" for a name without any plain letter.
 */
export function codePrefix(circleName: string): string {
  const words = circleName.split(/\s+/).filter((word) => !/^circle$/i.test(word));
  const initials = words.map((word) => /[a-z]/i.exec(word)?.[0] ?? '').join('');
  return initials.slice(0, 3).toUpperCase() || 'P';
}
