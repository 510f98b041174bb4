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
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatOption, MatSelect } from '@angular/material/select';
import { MatSnackBar } from '@angular/material/snack-bar';
import { Router } from '@angular/router';
import { map, of, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { CallState, errorText } from '../../ui/call-state';
import { focusFirstError } from '../../ui/focus-first-error';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { SaveState } from '../../ui/save-state';
import type { HasUnsavedChanges } from '../../ui/unsaved-guard';
import { usStates } from '../../ui/us-states';
import { zoneChoices } from '../../ui/us-zones';
import { weekdays } from '../../ui/weekdays';
import { copyFirstDay, counterAnswers, counterBody, counterRenames, fillCounter } from '../counter-answers';
import { PlacesApi } from '../places-api';

/** Add or change a counter. */
@Component({
  selector: 'db-counter-form',
  imports: [
    FieldMessagePipe,
    MatButton,
    MatCheckbox,
    MatFormFieldModule,
    MatInput,
    MatOption,
    MatProgressBar,
    MatSelect,
    NextAction,
    PageHeader,
    ProblemNote,
    ReactiveFormsModule,
  ],
  templateUrl: './counter-form.html',
  styleUrl: './counter-form.scss',
  host: { '(window:beforeunload)': 'warn($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CounterForm implements HasUnsavedChanges {
  private readonly api = inject(PlacesApi);
  private readonly router = inject(Router);
  private readonly snack = inject(MatSnackBar);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);

  /** From the path; none for a new one. */
  readonly id = input<string>();

  protected readonly form = counterAnswers();
  protected readonly saving = new SaveState();
  protected readonly looking = new CallState();
  protected readonly weekdays = weekdays;
  protected readonly usStates = usStates;
  protected readonly loaded = rxResource({
    params: () => this.id(),
    stream: ({ params }) => (params === undefined ? of(null) : this.api.counter(params)),
  });
  private readonly listed = rxResource({ stream: () => this.api.carriers() });
  protected readonly carriers = computed(() => (this.listed.hasValue() ? this.listed.value() : []));
  protected readonly seen = computed(() => (this.loaded.hasValue() ? this.loaded.value() : null));
  protected readonly isReady = computed(() => this.id() === undefined || this.seen() !== null);
  protected readonly problem = computed(() => errorText(this.loaded.error() ?? this.listed.error()));
  protected readonly value = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { requireSync: true },
  );
  protected readonly zones = computed(() => zoneChoices(this.value().zone));
  private readonly isDone = signal(false);

  constructor() {
    effect(() => {
      const seen = this.seen();
      if (seen) untracked(() => fillCounter(this.form, seen));
    });
    effect(() => {
      const only = this.carriers().length === 1 ? this.carriers()[0] : undefined;
      if (only && this.id() === undefined) untracked(() => this.form.controls.carrierId.setValue(only.id));
    });
  }

  hasUnsavedChanges(): boolean {
    return this.form.dirty && !this.isDone();
  }

  protected warn(event: BeforeUnloadEvent): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  /** City, state, position and clock of the ZIP code; the admin may make them more exact. */
  protected async fillFromZip(): Promise<void> {
    const { postalCode } = this.form.controls;
    postalCode.markAsTouched();
    if (postalCode.invalid || this.looking.busy()) return;
    const found = await this.looking.run(this.api.postalCode(postalCode.value));
    if (!found) return;
    const { city, state, lat, lon, zone } = found;
    this.form.patchValue({ city, state, lat, lon, zone });
    this.form.markAsDirty();
  }

  protected copyDays(): void {
    copyFirstDay(this.form);
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.saving.busy()) return;
    if (this.form.invalid) return this.refuse();
    const call = this.api.saveCounter(this.seen(), counterBody(this.form));
    const saved = await this.saving.save(call, this.form, counterRenames);
    if (!saved) return focusFirstError(this.host.nativeElement);
    this.isDone.set(true);
    this.snack.open(`${saved.name} is saved.`, undefined, { duration: 4000 });
    await this.router.navigateByUrl('/counters');
  }

  private refuse(): void {
    this.saving.say('Please correct the marked fields.');
    focusFirstError(this.host.nativeElement);
  }

  protected again(): void {
    this.saving.clear();
    this.loaded.reload();
    this.listed.reload();
  }
}
