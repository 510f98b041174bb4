import { computed, Directive, ElementRef, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import type { AbstractControl } from '@angular/forms';
import { MatSnackBar } from '@angular/material/snack-bar';
import { Router } from '@angular/router';
import { of, type Observable } from 'rxjs';
import { focusFirstError } from './focus-first-error';
import { SaveState } from './save-state';
import type { HasUnsavedChanges } from './unsaved-guard';

/**
 * A page that adds or changes one record: fetches it by the path's `id` (none for a new one), warns before what was typed is
 * lost, sends only what is complete, and goes back to the list once it is saved.
 */
@Directive({ host: { '(window:beforeunload)': 'warn($event)' } })
export abstract class EditPage<T> implements HasUnsavedChanges {
  private readonly router = inject(Router);
  private readonly snack = inject(MatSnackBar);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly isDone = signal(false);

  /** From the path; none for a new one. */
  readonly id = input<string>();

  protected abstract readonly form: AbstractControl;
  protected readonly saving = new SaveState();
  protected readonly loaded = rxResource({
    params: () => this.id(),
    stream: ({ params }) => (params === undefined ? of(undefined) : this.fetch(params)),
  });
  protected readonly seen = computed(() => (this.loaded.hasValue() ? (this.loaded.value() ?? null) : null));
  protected readonly isReady = computed(() => this.id() === undefined || this.seen() !== null);

  /** The record of the path's id; undefined when there is none. */
  protected abstract fetch(id: string): Observable<T | undefined>;

  hasUnsavedChanges(): boolean {
    return this.form.dirty && !this.isDone();
  }

  protected warn(event: BeforeUnloadEvent): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  /** Marks what is missing; false when something is, or while it is being saved already. */
  protected maySend(): boolean {
    this.form.markAllAsTouched();
    if (this.saving.busy()) return false;
    if (this.form.invalid) this.refuse();
    return this.form.valid;
  }

  protected refuse(): void {
    this.saving.say('Please correct the marked fields.');
    this.showFirstError();
  }

  protected showFirstError(): void {
    focusFirstError(this.host.nativeElement);
  }

  /** Fetches the present state again after a complaint. */
  protected again(): void {
    this.saving.clear();
    this.loaded.reload();
  }

  protected say(text: string): void {
    this.snack.open(text, undefined, { duration: 4000 });
  }

  /** Saved: says so and goes back to the list. */
  protected async leave(text: string, to: string): Promise<void> {
    this.isDone.set(true);
    this.say(text);
    await this.router.navigateByUrl(to);
  }
}
