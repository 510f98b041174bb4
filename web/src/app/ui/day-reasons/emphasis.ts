export interface Piece {
  readonly text: string;
  readonly isNumber: boolean;
}

/** A number with its unit, or two numbers with one: "38 °F", "2.5 °F", "66 to 79 °F", "40-hour", "52 h". */
const numbers =
  /(-?\d+(?:\.\d+)?(?: (?:to|and) -?\d+(?:\.\d+)?)? °[FC]|\d+-hour|\d+(?:\.\d+)? (?:h|days?)\b)/;

/** Cuts a sentence so that its numbers can be set in bold; joined again it is the same sentence. */
export function emphasis(sentence: string): readonly Piece[] {
  return sentence
    .split(numbers)
    .map((text, index) => ({ text, isNumber: index % 2 === 1 }))
    .filter((piece) => piece.text !== '');
}
