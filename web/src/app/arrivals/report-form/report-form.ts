import { ChangeDetectionStrategy, Component, inject, input, output } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import type { ReportBody } from '@shared/contract';
import { outcomeChoices, type Outcome } from '../arrival-words';

/** How it arrived: one tap and, if wanted, a few words. */
@Component({
  selector: 'db-report-form',
  imports: [MatButton, MatFormFieldModule, MatInput, MatRadioModule, ReactiveFormsModule],
  template: `<form [formGroup]="form" (ngSubmit)="send()">
    <mat-radio-group formControlName="outcome" aria-label="How did it arrive?" class="choices">
      @for (choice of choices; track choice[0]) {
        <mat-radio-button [value]="choice[0]">{{ choice[1] }}</mat-radio-button>
      }
    </mat-radio-group>
    <mat-form-field>
      <mat-label>Anything the breeder should know</mat-label>
      <textarea matInput rows="3" maxlength="1000" formControlName="text"></textarea>
    </mat-form-field>
    <p class="db-hint">
      Open the box indoors and look at the animal first. A weak one needs warmth, water, and quiet; call the
      breeder, or a veterinarian, at once.
    </p>
    <button matButton="filled" class="db-go" type="submit" [disabled]="form.invalid || busy()">
      Send the report
    </button>
  </form>`,
  styles: `
    .choices {
      display: grid;
      gap: 2px;
      margin-bottom: 12px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ReportForm {
  private readonly fields = inject(NonNullableFormBuilder);
  readonly busy = input(false);
  readonly sent = output<ReportBody>();
  protected readonly choices = outcomeChoices;
  protected readonly form = this.fields.group({
    outcome: this.fields.control<Outcome | ''>('', Validators.required),
    text: this.fields.control('', Validators.maxLength(1000)),
  });

  protected send(): void {
    const { outcome, text } = this.form.getRawValue();
    if (outcome !== '') this.sent.emit({ outcome, text });
  }
}
