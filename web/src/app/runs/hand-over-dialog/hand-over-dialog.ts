import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { Run } from '@shared/contract';
import type { TrackingEntry } from '../runs-api';

/** The tracking numbers as the counter gave them; none has to be known. Closes with those that were entered. */
@Component({
  selector: 'db-hand-over-dialog',
  imports: [MatButton, MatDialogModule, MatFormFieldModule, MatInput, ReactiveFormsModule],
  template: `<h2 mat-dialog-title>Handed over</h2>
    <form [formGroup]="form" (ngSubmit)="done()">
      <mat-dialog-content>
        <p>The buyers are told that it is on its way, with the tracking number where you enter one.</p>
        @for (parcel of run.parcels; track parcel.id) {
          <mat-form-field>
            <mat-label>{{ parcel.code }} to {{ parcel.destination }}</mat-label>
            <input
              matInput
              [formControlName]="parcel.id"
              autocapitalize="characters"
              autocomplete="off"
              maxlength="60"
            />
          </mat-form-field>
        }
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton="outlined" type="button" mat-dialog-close>Back</button>
        <button matButton="filled" class="db-go" type="submit">Handed over</button>
      </mat-dialog-actions>
    </form>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HandOverDialog {
  private readonly dialog = inject<MatDialogRef<HandOverDialog, TrackingEntry[]>>(MatDialogRef);
  protected readonly run = inject<Run>(MAT_DIALOG_DATA);
  protected readonly form = inject(NonNullableFormBuilder).record<string>(
    Object.fromEntries(
      this.run.parcels.map(({ id }) => [String(id), ['', Validators.maxLength(60)]]),
    ) as never,
  );

  protected done(): void {
    const entries = Object.entries(this.form.getRawValue()).map(([id, number]) => ({
      parcelId: Number(id),
      number: number.trim(),
    }));
    this.dialog.close(entries.filter((entry) => entry.number !== ''));
  }
}
