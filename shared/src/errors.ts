/** A field's complaint; `path` is dotted, empty for the whole. */
export interface FieldProblem {
  readonly path: string;
  readonly message: string;
}

/**
 * The one error class that crosses layers: a code from the table below, a sentence for people, field complaints and
 * extra members for the problem document. Anything else that is thrown is our own fault and becomes a plain 500.
 */
export class AppError extends Error {
  constructor(
    readonly code: ErrorCode,
    message: string,
    readonly errors: readonly FieldProblem[] = [],
    readonly extra: Readonly<Record<string, unknown>> = {},
    options?: ErrorOptions,
  ) {
    super(message, options);
    this.name = 'AppError';
  }

  get status(): number {
    return errorCodes[this.code].status;
  }

  get title(): string {
    return errorCodes[this.code].title;
  }
}

/** Every error code with its HTTP status and title (RFC 9457 `title`). */
export const errorCodes = {
  'bad-input': { status: 400, title: 'Some fields need another look' },
  'bad-json': { status: 400, title: 'The request is not valid JSON' },
  'not-signed-in': { status: 401, title: 'Please sign in' },
  'wrong-credentials': { status: 401, title: 'E-mail or password is wrong' },
  'bad-token': { status: 403, title: 'The form token is missing or old' },
  forbidden: { status: 403, title: 'Your role does not allow this' },
  'not-found': { status: 404, title: 'Not found' },
  'method-not-allowed': { status: 405, title: 'That cannot be done here' },
  conflict: { status: 409, title: 'That is not possible as things stand' },
  'day-not-offered': { status: 409, title: 'That day is not offered any more' },
  'move-not-allowed': { status: 409, title: 'That step is not possible now' },
  gone: { status: 410, title: 'This link has been used or has expired' },
  stale: { status: 412, title: 'Somebody changed this meanwhile' },
  'too-large': { status: 413, title: 'The request is too large' },
  'wrong-type': { status: 415, title: 'Send JSON' },
  'too-many': { status: 429, title: 'Too many tries' },
  'forecast-unavailable': { status: 503, title: 'The forecast service does not answer' },
  internal: { status: 500, title: 'Something went wrong on our side' },
} as const satisfies Record<string, { status: number; title: string }>;
export type ErrorCode = keyof typeof errorCodes;

/** 400 with field complaints. */
export const badInput = (
  errors: readonly FieldProblem[],
  message = 'Please correct the marked fields.',
): AppError => new AppError('bad-input', message, errors);

/** 404; also used where something exists but is none of the asker's business. */
export const notFound = (what: string): AppError => new AppError('not-found', `${what} was not found.`);

/** Narrows an unknown thrown value, by code when one is given. */
export const isAppError = (error: unknown, code?: ErrorCode): error is AppError =>
  error instanceof AppError && (code === undefined || error.code === code);
