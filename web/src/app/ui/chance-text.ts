export { chanceText } from '@shared/verdict/chance-text';

/** The same for a table's cell or a column's foot: `97 of 100`. */
export const chanceNumber = (chance: number): string =>
  chance > 0.995 ? '99+ of 100' : chance < 0.005 ? '<1 of 100' : `${Math.round(chance * 100)} of 100`;
