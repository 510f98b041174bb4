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
import { MatRadioModule } from '@angular/material/radio';
import type { Availability } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SaveState } from '../../ui/save-state';
import { AccountApi } from '../account-api';
import { withDrivingDay, withoutDrivingDay } from '../availability-edits';
import { SaveFoot } from '../save-foot/save-foot';

/** Single days on which a coordinator drives, or does not, other than the week says. */
@Component({
  selector: 'db-single-days',
  imports: [
    FieldMessagePipe,
    MatFormFieldModule,
    MatIcon,
    MatIconButton,
    MatInput,
    MatRadioModule,
    ReactiveFormsModule,
    SaveFoot,
  ],
  templateUrl: './single-days.html',
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SingleDays {
  private readonly api = inject(AccountApi);

  readonly availability = input.required<Availability>();
  readonly today = input.required<string>();
  readonly changed = output<Availability>();

  readonly form = inject(NonNullableFormBuilder).group({ date: ['', Validators.required], free: [true] });
  protected readonly saving = new SaveState();
  protected readonly days = computed(() =>
    this.availability()
      .drivingDays.filter((day) => day.date >= this.today())
      .map((day) => ({
        ...day,
        text: `${dayLabel(day.date)}: ${day.free ? 'you drive' : 'you do not drive'}`,
      })),
  );

  protected async add(entry: FormGroupDirective): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.busy()) return;
    const next = withDrivingDay(this.availability(), this.form.getRawValue());
    const index = next.drivingDays.findIndex((day) => day.date === this.form.controls.date.value);
    const saved = await this.saving.save(this.api.setAvailability(next), this.form, {
      [`drivingDays.${index}.date`]: 'date',
    });
    if (!saved) return;
    entry.resetForm();
    this.changed.emit(saved);
  }

  protected async remove(date: string): Promise<void> {
    if (this.saving.busy()) return;
    const saved = await this.saving.save(
      this.api.setAvailability(withoutDrivingDay(this.availability(), date)),
      this.form,
    );
    if (saved) this.changed.emit(saved);
  }
}
