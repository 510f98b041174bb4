import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { RouterLink } from '@angular/router';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { applyProblem, toProblem } from '../../core/http/problem';
import { PlainFrame } from '../../layout/plain-frame/plain-frame';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { SessionApi } from '../session-api';

@Component({
  selector: 'db-forgot-password',
  imports: [
    FieldMessagePipe,
    MatButton,
    MatFormFieldModule,
    MatInput,
    PlainFrame,
    ProblemNote,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './forgot-password.html',
  styleUrl: '../sign-in/sign-in.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ForgotPassword {
  private readonly api = inject(SessionApi);

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
  });
  protected readonly isBusy = signal(false);
  protected readonly isSent = signal(false);
  protected readonly message = signal<string | null>(null);

  protected async send(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    this.isBusy.set(true);
    this.message.set(null);
    try {
      await this.api.askForReset(this.form.getRawValue().email);
      this.isSent.set(true);
    } catch (error) {
      this.message.set(applyProblem(this.form, toProblem(error)));
    } finally {
      this.isBusy.set(false);
    }
  }
}
