import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatOption, MatSelect } from '@angular/material/select';
import type { Counter } from '@shared/contract';
import { map, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { CallState, errorText } from '../../ui/call-state';
import { EditPage } from '../../ui/edit-page';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
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
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CounterForm extends EditPage<Counter> {
  private readonly api = inject(PlacesApi);

  protected readonly form = counterAnswers();
  protected readonly looking = new CallState();
  protected readonly weekdays = weekdays;
  protected readonly usStates = usStates;
  private readonly listed = rxResource({ stream: () => this.api.carriers() });
  protected readonly carriers = computed(() => (this.listed.hasValue() ? this.listed.value() : []));
  protected readonly problem = computed(() => errorText(this.loaded.error() ?? this.listed.error()));
  protected readonly value = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { requireSync: true },
  );
  protected readonly zones = computed(() => zoneChoices(this.value().zone));

  constructor() {
    super();
    effect(() => {
      const seen = this.seen();
      if (seen) untracked(() => fillCounter(this.form, seen));
    });
    effect(() => {
      const only = this.carriers().length === 1 ? this.carriers()[0] : undefined;
      if (only && this.id() === undefined) untracked(() => this.form.controls.carrierId.setValue(only.id));
    });
  }

  protected override fetch(id: string) {
    return this.api.counter(id);
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
    if (!this.maySend()) return;
    const call = this.api.saveCounter(this.seen(), counterBody(this.form));
    const saved = await this.saving.save(call, this.form, counterRenames);
    if (saved) await this.leave(`${saved.name} is saved.`, '/counters');
    else this.showFirstError();
  }

  protected override again(): void {
    super.again();
    this.listed.reload();
  }
}
