import {
  ChangeDetectionStrategy,
  Component,
  effect,
  inject,
  input,
  output,
  signal,
  untracked,
} from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { CoordinatorProfile, Person } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SaveState } from '../../ui/save-state';
import { WeekdayToggle } from '../../ui/weekday-toggle/weekday-toggle';
import { AccountApi } from '../account-api';
import { SaveFoot } from '../save-foot/save-foot';

const whole = Validators.pattern(/^\d+$/);

/** The week a coordinator drives in, the vehicle, and what a mile costs. */
@Component({
  selector: 'db-driving-form',
  imports: [FieldMessagePipe, MatFormFieldModule, MatInput, ReactiveFormsModule, SaveFoot, WeekdayToggle],
  templateUrl: './driving-form.html',
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DrivingForm {
  private readonly api = inject(AccountApi);

  readonly person = input.required<Person>();
  readonly saved = output<Person>();
  readonly again = output();

  readonly form = new FormGroup({
    freeWeekdays: new FormControl<number[]>([], { nonNullable: true }),
    capacityL: new FormControl<number | null>(null, [
      Validators.required,
      Validators.min(1),
      Validators.max(20000),
    ]),
    longestRunMinutes: new FormControl<number | null>(null, [
      Validators.required,
      Validators.min(30),
      Validators.max(900),
      whole,
    ]),
    centsPerMile: new FormControl<number | null>(null, [
      Validators.required,
      Validators.min(0),
      Validators.max(1000),
      whole,
    ]),
  });
  protected readonly saving = new SaveState();
  protected readonly isDone = signal(false);

  constructor() {
    effect(() => {
      const profile = this.person().coordinator;
      untracked(() => {
        if (profile && this.form.pristine) this.form.reset(profile);
      });
    });
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    const coordinator = profileOf(this.form.getRawValue());
    if (this.form.invalid || !coordinator || this.saving.busy()) return;
    this.isDone.set(false);
    const fields = ['freeWeekdays', 'capacityL', 'longestRunMinutes', 'centsPerMile'];
    const rename = Object.fromEntries(fields.map((field) => [`coordinator.${field}`, field]));
    const person = await this.saving.save(this.api.change(this.person(), { coordinator }), this.form, rename);
    if (!person) return;
    this.form.markAsPristine();
    this.isDone.set(true);
    this.saved.emit(person);
  }

  protected reload(): void {
    this.saving.clear();
    this.form.markAsPristine();
    this.again.emit();
  }
}

function profileOf(value: {
  freeWeekdays: number[];
  capacityL: number | null;
  longestRunMinutes: number | null;
  centsPerMile: number | null;
}): CoordinatorProfile | null {
  const { freeWeekdays, capacityL, longestRunMinutes, centsPerMile } = value;
  if (capacityL === null || longestRunMinutes === null || centsPerMile === null) return null;
  return { freeWeekdays: freeWeekdays.toSorted((a, b) => a - b), capacityL, longestRunMinutes, centsPerMile };
}
