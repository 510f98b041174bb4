import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  input,
  signal,
  untracked,
} from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatSnackBar } from '@angular/material/snack-bar';
import { Router } from '@angular/router';
import { map, of, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { errorText } from '../../ui/call-state';
import { focusFirstError } from '../../ui/focus-first-error';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { SaveState } from '../../ui/save-state';
import type { HasUnsavedChanges } from '../../ui/unsaved-guard';
import { PlacesApi } from '../places-api';

/** Litres in a cubic inch: 2.54 cm is an inch by definition. */
const litresPerCubicInch = 2.54 ** 3 / 1000;

/** Add or change a box size. */
@Component({
  selector: 'db-box-form',
  imports: [
    FieldMessagePipe,
    MatButton,
    MatCheckbox,
    MatFormFieldModule,
    MatInput,
    MatProgressBar,
    NextAction,
    PageHeader,
    ProblemNote,
    ReactiveFormsModule,
  ],
  templateUrl: './box-form.html',
  styleUrl: './box-form.scss',
  host: { '(window:beforeunload)': 'warn($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoxForm implements HasUnsavedChanges {
  private readonly api = inject(PlacesApi);
  private readonly router = inject(Router);
  private readonly snack = inject(MatSnackBar);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly build = inject(NonNullableFormBuilder);

  /** From the path; none for a new one. */
  readonly id = input<string>();

  protected readonly form = this.build.group({
    name: ['', Validators.required],
    lengthIn: this.size(12),
    widthIn: this.size(9),
    heightIn: this.size(6),
    foamIn: this.size(0.75),
    active: [true],
  });
  protected readonly saving = new SaveState();
  protected readonly loaded = rxResource({
    params: () => this.id(),
    stream: ({ params }) => (params === undefined ? of(null) : this.api.box(params)),
  });
  protected readonly seen = computed(() => (this.loaded.hasValue() ? this.loaded.value() : null));
  protected readonly isReady = computed(() => this.id() === undefined || this.seen() !== null);
  protected readonly problem = computed(() => errorText(this.loaded.error()));
  protected readonly volume = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
      map(({ lengthIn, widthIn, heightIn }) => lengthIn * widthIn * heightIn * litresPerCubicInch),
    ),
    { requireSync: true },
  );
  private readonly isDone = signal(false);

  constructor() {
    effect(() => {
      const seen = this.seen();
      if (!seen) return;
      const { name, lengthIn, widthIn, heightIn, foamIn, active } = seen;
      untracked(() => this.form.reset({ name, lengthIn, widthIn, heightIn, foamIn, active }));
    });
  }

  hasUnsavedChanges(): boolean {
    return this.form.dirty && !this.isDone();
  }

  protected warn(event: BeforeUnloadEvent): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.saving.busy()) return;
    if (this.form.invalid) return this.refuse();
    const saved = await this.saving.save(this.api.saveBox(this.seen(), this.form.getRawValue()), this.form);
    if (!saved) return focusFirstError(this.host.nativeElement);
    this.isDone.set(true);
    this.snack.open(`${saved.name} is saved.`, undefined, { duration: 4000 });
    await this.router.navigateByUrl('/boxes');
  }

  private refuse(): void {
    this.saving.say('Please correct the marked fields.');
    focusFirstError(this.host.nativeElement);
  }

  protected again(): void {
    this.saving.clear();
    this.loaded.reload();
  }

  private size(inches: number) {
    return this.build.control(inches, [Validators.required, Validators.min(0.01)]);
  }
}
