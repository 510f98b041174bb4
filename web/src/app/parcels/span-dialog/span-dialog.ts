import { ChangeDetectionStrategy, Component, ElementRef, inject } from '@angular/core';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { Parcel } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { applyProblem } from '../../core/http/problem';
import { CallState } from '../../ui/call-state';
import { focusFirstError } from '../../ui/focus-first-error';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { ParcelsApi } from '../parcels-api';

export interface SpanQuestion {
  readonly parcel: Parcel;
  /** The date at the drop-off counter. */
  readonly today: string;
}

/** Leaves the day open inside a span: the next pooling may take any safe day of it. Closes with the parcel as saved. */
@Component({
  selector: 'db-span-dialog',
  imports: [
    FieldMessagePipe,
    MatButton,
    MatDialogModule,
    MatFormFieldModule,
    MatInput,
    ProblemNote,
    ReactiveFormsModule,
  ],
  template: `<h2 mat-dialog-title>Leave the day open</h2>
    <form [formGroup]="form" (ngSubmit)="save()" novalidate>
      <mat-dialog-content>
        <p>
          Any safe day from the first to the last may be chosen when runs are pooled. You are told which one.
        </p>
        <db-problem-note [message]="saving.message()" />
        <div class="fields">
          <mat-form-field floatLabel="always">
            <mat-label>From</mat-label>
            <input matInput type="date" formControlName="from" cdkFocusInitial />
            <mat-error>{{ form.controls.from.errors | fieldMessage }}</mat-error>
          </mat-form-field>
          <mat-form-field floatLabel="always">
            <mat-label>To</mat-label>
            <input matInput type="date" formControlName="to" />
            <mat-error>{{ form.controls.to.errors | fieldMessage }}</mat-error>
          </mat-form-field>
        </div>
      </mat-dialog-content>
      <mat-dialog-actions align="end">
        <button matButton="outlined" type="button" mat-dialog-close>Back</button>
        <button
          matButton="filled"
          class="db-go"
          type="submit"
          [disabled]="saving.busy()"
          [disabledInteractive]="true"
        >
          Leave it open
        </button>
      </mat-dialog-actions>
    </form>`,
  styles: `
    .fields {
      display: grid;
      grid-template-columns: repeat(auto-fit, minmax(160px, 1fr));
      gap: 14px;
      align-items: start;
      padding-top: 4px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SpanDialog {
  private readonly api = inject(ParcelsApi);
  private readonly dialog = inject<MatDialogRef<SpanDialog, Parcel>>(MatDialogRef);
  private readonly question = inject<SpanQuestion>(MAT_DIALOG_DATA);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);

  protected readonly saving = new CallState();
  protected readonly form = spanForm(this.question);

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.busy()) return focusFirstError(this.host.nativeElement);
    const call = this.api.book(this.question.parcel, { flexible: this.form.getRawValue() });
    const saved = await this.saving.run(call, (problem) =>
      applyProblem(this.form, problem, { 'flexible.from': 'from', 'flexible.to': 'to' }),
    );
    if (saved) this.dialog.close(saved);
  }
}

/** The span that is open already, else all days that the parcel can still have. */
function spanForm({ parcel, today }: SpanQuestion) {
  const from = parcel.flexible?.from ?? parcel.readyFrom;
  const field = (value: string) =>
    new FormControl(value, { nonNullable: true, validators: Validators.required });
  return new FormGroup({
    from: field(from < today ? today : from),
    to: field(parcel.flexible?.to ?? parcel.latestDate),
  });
}
