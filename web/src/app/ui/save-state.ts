import { HttpHeaders } from '@angular/common/http';
import { signal } from '@angular/core';
import type { AbstractControl } from '@angular/forms';
import type { Observable } from 'rxjs';
import { applyProblem } from '../core/http/problem';
import { CallState } from './call-state';

/** The saving of a form: complaints go to their fields, and whether somebody else saved in between (412) is known. */
export class SaveState extends CallState {
  private readonly staleState = signal(false);
  readonly isStale = this.staleState.asReadonly();

  /** Makes the call and answers its value; null when it failed, with the form marked and the words in `message`. */
  save<T>(
    call: Observable<T>,
    form: AbstractControl,
    rename: Readonly<Record<string, string>> = {},
  ): Promise<T | null> {
    this.staleState.set(false);
    return this.run(call, (problem) => {
      this.staleState.set(problem.code === 'stale');
      return applyProblem(form, problem, rename);
    });
  }

  /** The present state has been loaded: nothing is wrong any more. */
  clear(): void {
    this.staleState.set(false);
    this.say(null);
  }
}

/** The version an edit was made on, as request options; a later one on the server answers 412. */
export function onVersion(record: { readonly version: number }): { headers: HttpHeaders } {
  return { headers: new HttpHeaders({ 'If-Match': `"${record.version}"` }) };
}
