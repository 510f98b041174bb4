interface NamedLine {
  readonly quantity: number;
  readonly commonName: string;
}

/**
 * What lies in a box, in a few words: `contentsText([{quantity: 2, commonName: 'corn snake'}])` is "2 corn snakes".
 * Several kinds are joined with commas, lines of the same kind are added up; an empty box gives an empty text.
 */
export function contentsText(contents: readonly NamedLine[]): string {
  const counts = new Map<string, number>();
  for (const line of contents)
    counts.set(line.commonName, (counts.get(line.commonName) ?? 0) + line.quantity);
  return [...counts].map(([name, count]) => `${count} ${count === 1 ? name : plural(name)}`).join(', ');
}

/** Regular English plurals; "python" and "gecko" both take a plain s. */
function plural(name: string): string {
  if (/(s|x|z|ch|sh)$/i.test(name)) return `${name}es`;
  if (/[^aeiou]y$/i.test(name)) return `${name.slice(0, -1)}ies`;
  return `${name}s`;
}
