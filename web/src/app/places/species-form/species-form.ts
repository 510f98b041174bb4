import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import type { Species } from '@shared/contract';
import { map, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { UnitPreference } from '../../core/unit-preference';
import { errorText } from '../../ui/call-state';
import { EditPage } from '../../ui/edit-page';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
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
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpeciesForm extends EditPage<Species> {
  private readonly api = inject(PlacesApi);

  /** The unit of the fields; it stays the same while the page is open. */
  protected readonly unit = inject(UnitPreference).unit();
  protected readonly form = speciesAnswers();
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

  constructor() {
    super();
    effect(() => {
      const seen = this.seen();
      if (seen) untracked(() => fillSpecies(this.form, seen, this.unit));
    });
  }

  protected override fetch(id: string) {
    return this.api.oneSpecies(id);
  }

  protected async save(): Promise<void> {
    if (!this.maySend()) return;
    const seen = this.seen();
    const body = speciesBody(this.form, this.unit, seen);
    const saved = await this.saving.save(this.api.saveSpecies(seen, body), this.form);
    if (saved) await this.leave(`The ${saved.commonName} is saved.`, '/species');
    else this.showFirstError();
  }
}
