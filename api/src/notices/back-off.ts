/** A mail is given up after so many attempts (about four hours). Assumption. */
export const maxAttempts = 10;

/** Minutes to wait after the n-th failed attempt (n from 1): 1, 2, 4, … and never more than an hour. */
export const backOffMinutes = (attempt: number): number => Math.min(60, 2 ** (attempt - 1));
