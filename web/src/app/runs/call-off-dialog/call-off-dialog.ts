import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { Run } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';

/** Why a run does not go. Closes with the reason, which its people read. */
@Component({
  selector: 'db-call-off-dialog',
  imports: [FieldMessagePipe, MatButton, MatDialogModule, MatFormFieldModule, MatInput, ReactiveFormsModule],
  template: `<h2 mat-dialog-title>Call off this run?</h2>
    <form (ngSubmit)="done()">
      <mat-dialog-content>
        <p>
          {{
            run.state === 'proposed'
              ? 'Nobody has been told of it yet.'
              : 'Everybody on it is told, with your reason.'
          }}
          Its parcels wait for another run.
        </p>
        <mat-form-field>
          <mat-label>Why?</mat-label>
          <textarea matInput rows="2" maxlength="500" [formControl]="reason" cdkFocusInitial></textarea>
          <mat-error>{{ reason.errors | fieldMessage }}</mat-error>
        </mat-form-field>
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton="outlined" type="button" mat-dialog-close>Keep it</button>
        <button matButton="filled" class="db-go" type="submit">Call it off</button>
      </mat-dialog-actions>
    </form>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CallOffDialog {
  private readonly dialog = inject<MatDialogRef<CallOffDialog, string>>(MatDialogRef);
  protected readonly run = inject<Run>(MAT_DIALOG_DATA);
  protected readonly reason = new FormControl('', {
    nonNullable: true,
    validators: [Validators.required, Validators.minLength(3), Validators.maxLength(500)],
  });

  protected done(): void {
    this.reason.markAsTouched();
    if (this.reason.valid) this.dialog.close(this.reason.value.trim());
  }
}
