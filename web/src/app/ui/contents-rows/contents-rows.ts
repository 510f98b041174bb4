import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton, MatIconButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatOption, MatSelect, MatSelectTrigger } from '@angular/material/select';
import { map, startWith, switchMap } from 'rxjs';
import type { Species, TemperatureUnit } from '@shared/contract';
import { commonBand } from '@shared/parcels/common-band';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { rangeText } from '../../core/temperature';
import {
  contentLineForm,
  contentLines,
  loadText,
  mostLines,
  prefillMass,
  type ContentLineForm,
  type ContentsForm,
} from './contents-form';

/** What is in the box: one row a species with number and mass, the sum and the common band below. */
@Component({
  selector: 'db-contents-rows',
  imports: [
    FieldMessagePipe,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatIconButton,
    MatInput,
    MatOption,
    MatSelect,
    MatSelectTrigger,
    ReactiveFormsModule,
  ],
  templateUrl: './contents-rows.html',
  styleUrl: './contents-rows.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ContentsRows {
  readonly form = input.required<ContentsForm>();
  readonly species = input.required<readonly Species[]>();
  readonly unit = input<TemperatureUnit>('F');

  private readonly value = toSignal(
    toObservable(this.form).pipe(
      switchMap((form) =>
        form.events.pipe(
          startWith(null),
          map(() => ({ rows: [...form.controls], lines: contentLines(form), errors: form.errors })),
        ),
      ),
    ),
    { initialValue: { rows: [], lines: null, errors: null } },
  );
  protected readonly rows = computed<readonly ContentLineForm[]>(() => this.value().rows);
  protected readonly errors = computed(() => this.value().errors);
  protected readonly isFull = computed(() => this.rows().length >= mostLines);
  protected readonly load = computed(() => loadText(this.value().lines));
  private readonly band = computed(() =>
    commonBand(
      (this.value().lines ?? []).flatMap(
        (line) => this.species().find((one) => one.id === line.speciesId) ?? [],
      ),
    ),
  );
  protected readonly bandText = computed(() => {
    const band = this.band();
    return band?.ok ? `Planned band in the box: ${rangeText(band, this.unit())}.` : '';
  });
  protected readonly conflict = computed(() => {
    const band = this.band();
    return band && !band.ok
      ? `No temperature suits both ${band.warmest} and ${band.coolest}: give them a box each.`
      : '';
  });

  protected add(): void {
    this.form().push(contentLineForm());
    this.form().markAsDirty();
  }

  protected remove(index: number): void {
    this.form().removeAt(index);
    this.form().markAsDirty();
  }

  protected nameOf(row: ContentLineForm): string {
    return this.species().find((one) => one.id === row.controls.speciesId.value)?.commonName ?? '';
  }

  protected speciesChosen(row: ContentLineForm): void {
    prefillMass(row, this.species());
  }
}
