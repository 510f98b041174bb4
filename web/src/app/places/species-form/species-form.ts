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
import { MatSnackBar } from '@angular/material/snack-bar';
import { Router } from '@angular/router';
import { map, of, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { UnitPreference } from '../../core/unit-preference';
import { errorText } from '../../ui/call-state';
import { focusFirstError } from '../../ui/focus-first-error';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { SaveState } from '../../ui/save-state';
import type { HasUnsavedChanges } from '../../ui/unsaved-guard';
import { BandBar } from '../band-bar/band-bar';
import { PlacesApi } from '../places-api';
import { fillSpecies, speciesAnswers, speciesBody } from '../species-answers';

/** Add or change a species: its bands, its limits, what to mind. */
@Component({
  selector: 'db-species-form',
  imports: [
    BandBar,
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
  templateUrl: './species-form.html',
  styleUrl: './species-form.scss',
  host: { '(window:beforeunload)': 'warn($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpeciesForm implements HasUnsavedChanges {
  private readonly api = inject(PlacesApi);
  private readonly router = inject(Router);
  private readonly snack = inject(MatSnackBar);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);

  /** From the path; none for a new one. */
  readonly id = input<string>();

  /** The unit of the fields; it stays the same while the page is open. */
  protected readonly unit = inject(UnitPreference).unit();
  protected readonly form = speciesAnswers();
  protected readonly saving = new SaveState();
  protected readonly loaded = rxResource({
    params: () => this.id(),
    stream: ({ params }) => (params === undefined ? of(null) : this.api.oneSpecies(params)),
  });
  protected readonly seen = computed(() => (this.loaded.hasValue() ? this.loaded.value() : null));
  protected readonly isReady = computed(() => this.id() === undefined || this.seen() !== null);
  protected readonly heading = computed(() => {
    const name = this.seen()?.commonName ?? (this.id() === undefined ? 'a new species' : 'species');
    return `${name[0]?.toUpperCase() ?? ''}${name.slice(1)}`;
  });
  protected readonly problem = computed(() => errorText(this.loaded.error()));
  private readonly value = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { requireSync: true },
  );
  /** The bands as they are typed, once all four stand there in order. */
  protected readonly drawn = computed(() => {
    const { bandLowF: low, bandHighF: high, enduranceLowF: eLow, enduranceHighF: eHigh } = this.value();
    if (low === null || high === null || eLow === null || eHigh === null) return null;
    const isInOrder = eLow <= low && low < high && high <= eHigh;
    return isInOrder ? speciesBody(this.form, this.unit, this.seen()) : null;
  });
  private readonly isDone = signal(false);

  constructor() {
    effect(() => {
      const seen = this.seen();
      if (seen) untracked(() => fillSpecies(this.form, seen, this.unit));
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
    const seen = this.seen();
    const saved = await this.saving.save(
      this.api.saveSpecies(seen, speciesBody(this.form, this.unit, seen)),
      this.form,
    );
    if (!saved) return focusFirstError(this.host.nativeElement);
    this.isDone.set(true);
    this.snack.open(`The ${saved.commonName} is saved.`, undefined, { duration: 4000 });
    await this.router.navigateByUrl('/species');
  }

  private refuse(): void {
    this.saving.say('Please correct the marked fields.');
    focusFirstError(this.host.nativeElement);
  }

  protected again(): void {
    this.saving.clear();
    this.loaded.reload();
  }
}
