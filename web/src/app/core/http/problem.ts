import { HttpErrorResponse } from '@angular/common/http';
import type { AbstractControl } from '@angular/forms';
import type { FieldError, Problem } from '@shared/contract';

/** What a failed call throws after the problem interceptor: the server's problem document, always complete. */
export class ProblemError extends Error {
  constructor(readonly problem: Problem) {
    super(problem.detail ?? problem.title);
    this.name = 'ProblemError';
  }
}

/** Any failure as a problem document; a dead connection and an answer that is not ours get words of their own. */
export function toProblem(thrown: unknown): Problem {
  if (thrown instanceof ProblemError) return thrown.problem;
  const status = thrown instanceof HttpErrorResponse ? thrown.status : 500;
  const body: unknown = thrown instanceof HttpErrorResponse ? thrown.error : null;
  if (isProblem(body)) return { ...body, errors: Array.isArray(body.errors) ? body.errors : [] };
  if (thrown instanceof HttpErrorResponse && status === 0)
    return made(
      'offline',
      0,
      'No connection',
      'The server does not answer. Check your connection and try again.',
    );
  return made(
    'internal',
    status,
    'Something went wrong on our side',
    'Try again; if it stays, tell an admin.',
  );
}

/** Whether a thrown value carries this problem code. */
export const isProblemCode = (thrown: unknown, code: string): boolean => toProblem(thrown).code === code;

/**
 * Puts the server's complaints onto the controls they belong to (as the error `server`, gone at the next edit) and
 * answers the sentence for the top of the form, with complaints that no control takes written out.
 * `rename` maps a path of the API to a path of the form where the two differ.
 */
export function applyProblem(
  form: AbstractControl,
  problem: Problem,
  rename: Readonly<Record<string, string>> = {},
): string {
  const homeless: FieldError[] = [];
  for (const error of problem.errors) {
    const control = error.path === '' ? null : controlFor(form, rename[error.path] ?? error.path);
    if (!control) {
      homeless.push(error);
      continue;
    }
    control.setErrors({ ...control.errors, server: error.message });
    control.markAsTouched();
  }
  const top = problem.detail ?? problem.title;
  return [top, ...homeless.map((error) => error.message)].join(' ');
}

/** The first complaint of a control in words, or an empty text; for `<mat-error>`. */
export function fieldMessage(errors: Readonly<Record<string, unknown>> | null): string {
  if (!errors) return '';
  if (typeof errors['server'] === 'string') return errors['server'];
  for (const [key, words] of Object.entries(plainMessages)) if (key in errors) return words;
  return Object.values(errors).find((value): value is string => typeof value === 'string') ?? 'Check this.';
}

const plainMessages: Readonly<Record<string, string>> = {
  required: 'Fill this in.',
  email: 'Enter an e-mail address like name@example.org.',
  matDatepickerParse: 'Use a date like 12/8/2026.',
  matDatepickerMin: 'That is too early.',
  matDatepickerMax: 'That is too late.',
  minlength: 'A little longer, please.',
  maxlength: 'That is too long.',
  min: 'That is too small.',
  max: 'That is too large.',
  pattern: 'Check how this is written.',
};

/** The control at a path; a path into a control that has no parts (an address, a list) is taken by that control. */
function controlFor(form: AbstractControl, path: string): AbstractControl | null {
  const parts = path.split('.');
  for (let length = parts.length; length > 0; length--) {
    const control = form.get(parts.slice(0, length));
    if (control) return control;
  }
  return null;
}

function isProblem(body: unknown): body is Problem {
  return typeof body === 'object' && body !== null && 'code' in body && 'title' in body && 'status' in body;
}

function made(code: string, status: number, title: string, detail: string): Problem {
  return { type: `urn:dayberth:problem:${code}`, code, status, title, detail, errors: [] };
}
