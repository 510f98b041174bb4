import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import {
  type FormGroupDirective,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  Validators,
} from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SaveState } from '../../ui/save-state';
import { AccountApi } from '../account-api';
import { SaveFoot } from '../save-foot/save-foot';

/** A new password; one's other sessions end with it. */
@Component({
  selector: 'db-password-form',
  imports: [FieldMessagePipe, MatFormFieldModule, MatButton, MatInput, ReactiveFormsModule, SaveFoot],
  templateUrl: './password-form.html',
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PasswordForm {
  private readonly api = inject(AccountApi);

  readonly form = inject(NonNullableFormBuilder).group({
    current: ['', Validators.required],
    next: ['', [Validators.required, Validators.minLength(10), Validators.maxLength(200)]],
  });
  protected readonly saving = new SaveState();
  protected readonly isDone = signal(false);
  protected readonly isShown = signal(false);

  protected async save(entry: FormGroupDirective): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.busy()) return;
    this.isDone.set(false);
    // The answer has no body: null is what success looks like, so it is told from failure by the message.
    await this.saving.save(this.api.changePassword(this.form.getRawValue()), this.form);
    if (this.saving.message() !== null) return;
    // Not the form alone: the fields would go on complaining that they are empty.
    entry.resetForm();
    this.isDone.set(true);
  }
}
