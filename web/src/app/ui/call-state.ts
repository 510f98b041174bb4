import { signal } from '@angular/core';
import { firstValueFrom, type Observable } from 'rxjs';
import type { Problem } from '@shared/contract';
import { toProblem } from '../core/http/problem';

/** A call that a button starts: whether it is under way, and in words what went wrong with the last one. */
export class CallState {
  private readonly busyState = signal(false);
  private readonly messageState = signal<string | null>(null);
  readonly busy = this.busyState.asReadonly();
  readonly message = this.messageState.asReadonly();

  /**
   * Makes the call and answers its value; null when it failed, with the words in `message`. `explain` may put the
   * problem onto a form and answer the sentence for its top.
   */
  async run<T>(call: Observable<T>, explain: (problem: Problem) => string = problemText): Promise<T | null> {
    this.busyState.set(true);
    this.messageState.set(null);
    try {
      return await firstValueFrom(call);
    } catch (thrown) {
      this.messageState.set(explain(toProblem(thrown)));
      return null;
    } finally {
      this.busyState.set(false);
    }
  }

  say(message: string | null): void {
    this.messageState.set(message);
  }
}

/** A problem as one or two sentences, field complaints included, for places without fields. */
export function problemText(problem: Problem): string {
  return [problem.detail ?? problem.title, ...problem.errors.map((error) => error.message)].join(' ');
}

/** The words of a failed resource; null while there is none. */
export const errorText = (error: unknown): string | null => (error ? problemText(toProblem(error)) : null);
