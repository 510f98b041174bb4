import { ChangeDetectionStrategy, Component, computed, inject, input, resource, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { applyProblem, toProblem } from '../../core/http/problem';
import { landingFor } from '../../core/session/landing-for';
import { SessionStore } from '../../core/session/session-store';
import { PlainFrame } from '../../layout/plain-frame/plain-frame';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { SessionApi } from '../session-api';

/** Where invitations and reset mails lead: set a password, and be signed in. */
@Component({
  selector: 'db-account-link',
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
  templateUrl: './account-link.html',
  styleUrl: '../sign-in/sign-in.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountLinkPage {
  private readonly api = inject(SessionApi);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  readonly token = input.required<string>();

  protected readonly link = resource({
    params: () => this.token(),
    loader: ({ params }) => this.api.accountLink(params),
  });
  protected readonly refusal = computed(() => {
    const error = this.link.error();
    return error ? (toProblem(error.cause ?? error).detail ?? 'This link does not work any more.') : null;
  });
  protected readonly known = computed(() => (this.link.hasValue() ? this.link.value() : null));
  protected readonly heading = computed(() => {
    const link = this.known();
    if (!link) return 'Set your password';
    return link.kind === 'invitation' ? `Welcome, ${link.name}` : 'Set a new password';
  });
  // Ten characters: the contract's `newPassword`.
  protected readonly form = inject(NonNullableFormBuilder).group({
    password: ['', [Validators.required, Validators.minLength(10)]],
  });
  protected readonly isBusy = signal(false);
  protected readonly message = signal<string | null>(null);

  protected async save(email: string): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    this.isBusy.set(true);
    this.message.set(null);
    const { password } = this.form.getRawValue();
    try {
      await this.api.useAccountLink(this.token(), password);
      const { me } = await this.session.signIn({ email, password });
      await this.router.navigateByUrl(landingFor(me?.roles ?? []));
    } catch (error) {
      this.message.set(applyProblem(this.form, toProblem(error)));
    } finally {
      this.isBusy.set(false);
    }
  }
}
