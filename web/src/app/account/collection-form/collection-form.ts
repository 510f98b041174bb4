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
import type { Person } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SaveState } from '../../ui/save-state';
import { endMinuteOf, minuteOf, timeText } from '../../ui/time-text';
import { AccountApi } from '../account-api';
import { SaveFoot } from '../save-foot/save-foot';

/** When a breeder's parcels can be collected, and how long a driver stays. */
@Component({
  selector: 'db-collection-form',
  imports: [FieldMessagePipe, MatFormFieldModule, MatInput, ReactiveFormsModule, SaveFoot],
  template: `<h2>Collection at your place</h2>
    <p class="db-hint">A driver may come at any time inside the window, also at its very end.</p>
    <form [formGroup]="form" (ngSubmit)="save()" novalidate>
      <div class="fields">
        <mat-form-field floatLabel="always">
          <mat-label>From</mat-label>
          <input matInput type="time" formControlName="open" />
          <mat-error>{{ form.controls.open.errors | fieldMessage }}</mat-error>
        </mat-form-field>
        <mat-form-field floatLabel="always">
          <mat-label>To</mat-label>
          <input matInput type="time" formControlName="close" />
          <mat-error>{{ form.controls.close.errors | fieldMessage }}</mat-error>
        </mat-form-field>
        <mat-form-field>
          <mat-label>Minutes a stop takes</mat-label>
          <input
            matInput
            type="number"
            inputmode="numeric"
            min="0"
            max="120"
            formControlName="serviceMinutes"
          />
          <mat-error>{{ form.controls.serviceMinutes.errors | fieldMessage }}</mat-error>
        </mat-form-field>
      </div>
      <db-save-foot [state]="saving" [isDone]="isDone() && form.pristine" (again)="reload()" />
    </form>`,
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CollectionForm {
  private readonly api = inject(AccountApi);

  readonly person = input.required<Person>();
  readonly saved = output<Person>();
  readonly again = output();

  readonly form = new FormGroup({
    open: new FormControl('', { nonNullable: true, validators: Validators.required }),
    close: new FormControl('', { nonNullable: true, validators: Validators.required }),
    serviceMinutes: new FormControl<number | null>(null, [
      Validators.required,
      Validators.min(0),
      Validators.max(120),
      Validators.pattern(/^\d+$/),
    ]),
  });
  protected readonly saving = new SaveState();
  protected readonly isDone = signal(false);

  constructor() {
    effect(() => {
      const profile = this.person().breeder;
      untracked(() => {
        if (!profile || this.form.dirty) return;
        const { windowOpenMinute, windowCloseMinute, serviceMinutes } = profile;
        this.form.reset({
          open: timeText(windowOpenMinute),
          close: timeText(windowCloseMinute),
          serviceMinutes,
        });
      });
    });
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    const { open, close, serviceMinutes } = this.form.getRawValue();
    const [windowOpenMinute, windowCloseMinute] = [minuteOf(open), endMinuteOf(close)];
    if (
      this.form.invalid ||
      windowOpenMinute === null ||
      windowCloseMinute === null ||
      serviceMinutes === null
    )
      return;
    if (this.saving.busy()) return;
    this.isDone.set(false);
    const breeder = { windowOpenMinute, windowCloseMinute, serviceMinutes };
    const person = await this.saving.save(this.api.change(this.person(), { breeder }), this.form, {
      'breeder.windowOpenMinute': 'open',
      'breeder.windowCloseMinute': 'close',
      'breeder.serviceMinutes': 'serviceMinutes',
    });
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
