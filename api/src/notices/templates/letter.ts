import { htmlOf } from './letter-html';

/** What a mail says, twice: as plain text and as HTML, from the same parts. */
export interface Letter {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

export interface LetterParts {
  readonly subject: string;
  /** Over the large line, e.g. "Your corn snake arrives". */
  readonly lead: string;
  /** The thing to see at a glance, in one or two lines, e.g. a weekday and a date. */
  readonly large: readonly [string, string?];
  readonly paragraphs: readonly string[];
  /** Things in their order, e.g. the stops of a drive. */
  readonly steps?: readonly string[];
  /** Facts as label and value. */
  readonly facts?: readonly (readonly [string, string])[];
  /** Things to have ready, under one label. */
  readonly list?: { readonly label: string; readonly items: readonly string[] };
  readonly button?: { readonly label: string; readonly url: string };
  /** What became of the calendar, in a sentence. */
  readonly calendarNote?: string;
  /** Whether it speaks of a safe day, so that the planning note belongs under it. */
  readonly planning?: boolean;
  /** Why the mail came to this person, in a sentence. */
  readonly because: string;
}

export const planningNote =
  "A planning aid. Your carrier's terms, local law and your veterinarian come first.";

/** Makes both forms of a mail; every value is escaped in the HTML. */
export function letter(parts: LetterParts): Letter {
  return { subject: parts.subject, text: textOf(parts), html: htmlOf(parts) };
}

function textOf(parts: LetterParts): string {
  const steps = (parts.steps ?? []).map((step, index) => `${index + 1}. ${step}`).join('\n');
  const facts = (parts.facts ?? [])
    .map(([label, value]) => `${label}: ${value.replaceAll('\n', ', ')}`)
    .join('\n');
  const list = parts.list
    ? [`${parts.list.label}:`, ...parts.list.items.map((item) => `- ${item}`)].join('\n')
    : '';
  const blocks = [
    parts.lead,
    largeText(parts),
    ...parts.paragraphs,
    steps,
    facts,
    list,
    parts.button ? `${parts.button.label}: ${parts.button.url}` : '',
    parts.calendarNote ?? '',
    parts.planning ? planningNote : '',
    `-- \n${parts.because}`,
  ];
  return `${blocks.filter((block) => block !== '').join('\n\n')}\n`;
}

/** The large lines as one. */
export const largeText = ({ large }: Pick<LetterParts, 'large'>): string =>
  large.filter((line) => line !== undefined).join(', ');
