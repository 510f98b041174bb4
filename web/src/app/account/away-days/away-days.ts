import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import {
  type FormGroupDirective,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  Validators,
} from '@angular/forms';
import { MatIconButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import type { Availability, DaysAway } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SaveState } from '../../ui/save-state';
import { AccountApi } from '../account-api';
import { spanText, withAway, withoutAway } from '../availability-edits';
import { SaveFoot } from '../save-foot/save-foot';

/** Days on which one is away: nothing is collected from a breeder then, and a coordinator drives no run. */
@Component({
  selector: 'db-away-days',
  imports: [
    FieldMessagePipe,
    MatFormFieldModule,
    MatIcon,
    MatIconButton,
    MatInput,
    ReactiveFormsModule,
    SaveFoot,
  ],
  templateUrl: './away-days.html',
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AwayDays {
  private readonly api = inject(AccountApi);

  readonly availability = input.required<Availability>();
  /** `YYYY-MM-DD`; what lies before is over and not shown. */
  readonly today = input.required<string>();
  readonly changed = output<Availability>();

  readonly form = inject(NonNullableFormBuilder).group({
    from: ['', Validators.required],
    to: [''],
    note: ['', Validators.maxLength(200)],
  });
  protected readonly saving = new SaveState();
  protected readonly spans = computed(() =>
    this.availability()
      .daysAway.filter((span) => span.to >= this.today())
      .map((span) => ({ span, text: spanText(span) })),
  );

  protected async add(entry: FormGroupDirective): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.busy()) return;
    const { from, to, note } = this.form.getRawValue();
    const next = withAway(this.availability(), { from, to: to || from, note });
    const index = next.daysAway.findIndex((span) => span.from === from && span.note === note.trim());
    const rename = {
      [`daysAway.${index}.from`]: 'from',
      [`daysAway.${index}.to`]: 'to',
      [`daysAway.${index}.note`]: 'note',
    };
    const saved = await this.saving.save(this.api.setAvailability(next), this.form, rename);
    if (!saved) return;
    entry.resetForm();
    this.changed.emit(saved);
  }

  protected async remove(span: DaysAway): Promise<void> {
    if (this.saving.busy()) return;
    const saved = await this.saving.save(
      this.api.setAvailability(withoutAway(this.availability(), span)),
      this.form,
    );
    if (saved) this.changed.emit(saved);
  }
}
