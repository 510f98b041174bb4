import { ChangeDetectionStrategy, Component, computed, effect, inject, untracked } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import type { Box } from '@shared/contract';
import { map, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { errorText } from '../../ui/call-state';
import { EditPage } from '../../ui/edit-page';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
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
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoxForm extends EditPage<Box> {
  private readonly api = inject(PlacesApi);
  private readonly build = inject(NonNullableFormBuilder);

  protected readonly form = this.build.group({
    name: ['', Validators.required],
    lengthIn: this.size(12),
    widthIn: this.size(9),
    heightIn: this.size(6),
    foamIn: this.size(0.75),
    active: [true],
  });
  protected readonly problem = computed(() => errorText(this.loaded.error()));
  protected readonly volume = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
      map(({ lengthIn, widthIn, heightIn }) => lengthIn * widthIn * heightIn * litresPerCubicInch),
    ),
    { requireSync: true },
  );

  constructor() {
    super();
    effect(() => {
      const seen = this.seen();
      if (!seen) return;
      const { name, lengthIn, widthIn, heightIn, foamIn, active } = seen;
      untracked(() => this.form.reset({ name, lengthIn, widthIn, heightIn, foamIn, active }));
    });
  }

  protected override fetch(id: string) {
    return this.api.box(id);
  }

  protected async save(): Promise<void> {
    if (!this.maySend()) return;
    const saved = await this.saving.save(this.api.saveBox(this.seen(), this.form.getRawValue()), this.form);
    if (saved) await this.leave(`${saved.name} is saved.`, '/boxes');
    else this.showFirstError();
  }

  private size(inches: number) {
    return this.build.control(inches, [Validators.required, Validators.min(0.01)]);
  }
}
