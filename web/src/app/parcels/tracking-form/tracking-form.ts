import { ChangeDetectionStrategy, Component, effect, input, output, untracked } from '@angular/core';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';

/** The carrier's tracking number, as it stands on the receipt; an empty field takes it back. */
@Component({
  selector: 'db-tracking-form',
  imports: [FieldMessagePipe, MatButton, MatFormFieldModule, MatInput, ReactiveFormsModule],
  template: `<form (submit)="$event.preventDefault(); submit()">
    <mat-form-field>
      <mat-label>Tracking number</mat-label>
      <input
        matInput
        [formControl]="number"
        autocomplete="off"
        autocapitalize="characters"
        spellcheck="false"
      />
      <mat-error>{{ number.errors | fieldMessage }}</mat-error>
    </mat-form-field>
    <button matButton="outlined" type="submit" [disabled]="busy()" [disabledInteractive]="true">
      Save the number
    </button>
  </form>`,
  styles: `
    form {
      display: flex;
      flex-wrap: wrap;
      gap: 10px;
      align-items: flex-start;
    }
    mat-form-field {
      flex: 1 1 200px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class TrackingForm {
  readonly value = input<string | null>(null);
  readonly busy = input(false);
  readonly save = output<string | null>();

  protected readonly number = new FormControl('', {
    nonNullable: true,
    validators: Validators.maxLength(60),
  });

  constructor() {
    effect(() => {
      const value = this.value() ?? '';
      untracked(() => this.number.reset(value));
    });
  }

  protected submit(): void {
    if (this.number.valid && !this.busy()) this.save.emit(this.number.value.trim() || null);
  }
}
