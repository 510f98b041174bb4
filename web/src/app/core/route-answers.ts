import type { ContentLine, Service } from '@shared/contract';

/** What somebody answered about a route, carried in an address from a route check to a new parcel. */
export interface RouteAnswers {
  readonly service: Service;
  /** The hold counter; null for door service or while not chosen. */
  readonly counterId: number | null;
  readonly postalCode: string | null;
  readonly contents: readonly ContentLine[];
  readonly boxId: number | null;
  readonly dropOffCounterId: number | null;
  /** The day they looked at, `YYYY-MM-DD`. */
  readonly date: string | null;
}

export type AnswerQuery = Readonly<Record<string, string>>;

/** The answers as query parameters; contents as `species x quantity x grams`, e.g. `3x1x160,5x2x35`. */
export function answersToQuery(answers: RouteAnswers): AnswerQuery {
  const query: Record<string, string> = { service: answers.service };
  const put = (key: string, value: string | number | null) => {
    if (value !== null && value !== '') query[key] = String(value);
  };
  put('counter', answers.counterId);
  put('zip', answers.postalCode);
  put(
    'contents',
    answers.contents.map((line) => [line.speciesId, line.quantity, line.massG].join('x')).join(','),
  );
  put('box', answers.boxId);
  put('from', answers.dropOffCounterId);
  put('day', answers.date);
  return query;
}

/** Reads the answers back. What is missing or cannot be read is left out: an address may come from anywhere. */
export function answersFromQuery(read: (key: string) => string | null): RouteAnswers {
  const postalCode = read('zip');
  const date = read('day');
  return {
    service: read('service') === 'door' ? 'door' : 'hold',
    counterId: wholeNumber(read('counter')),
    postalCode: postalCode !== null && /^\d{5}$/.test(postalCode) ? postalCode : null,
    contents: (read('contents') ?? '').split(',').flatMap(lineOf).slice(0, 10),
    boxId: wholeNumber(read('box')),
    dropOffCounterId: wholeNumber(read('from')),
    date: date !== null && /^\d{4}-\d{2}-\d{2}$/.test(date) ? date : null,
  };
}

function lineOf(text: string): ContentLine[] {
  const parts = /^(\d{1,9})x(\d{1,2})x(\d{1,5}(?:\.\d{1,2})?)$/.exec(text);
  if (!parts) return [];
  const [speciesId, quantity, massG] = parts.slice(1).map(Number);
  return speciesId && quantity && massG ? [{ speciesId, quantity, massG }] : [];
}

function wholeNumber(text: string | null): number | null {
  return text !== null && /^[1-9]\d{0,8}$/.test(text) ? Number(text) : null;
}
