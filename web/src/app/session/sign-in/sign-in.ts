import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Router, RouterLink } from '@angular/router';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { applyProblem, toProblem } from '../../core/http/problem';
import { landingFor, safeReturn } from '../../core/session/landing-for';
import { SessionStore } from '../../core/session/session-store';
import { PlainFrame } from '../../layout/plain-frame/plain-frame';
import { ProblemNote } from '../../ui/problem-note/problem-note';

@Component({
  selector: 'db-sign-in',
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
  templateUrl: './sign-in.html',
  styleUrl: './sign-in.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class SignInPage {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  /** The page to return to, from the address. */
  readonly from = input<string>();

  protected readonly form = inject(NonNullableFormBuilder).group({
    email: ['', [Validators.required, Validators.email]],
    password: ['', Validators.required],
  });
  protected readonly isDemo = this.session.isDemo;
  protected readonly isBusy = signal(false);
  protected readonly message = signal<string | null>(null);

  constructor() {
    this.session.ready().catch((error: unknown) => this.message.set(toProblem(error).detail ?? null));
  }

  protected async signIn(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.isBusy()) return;
    this.isBusy.set(true);
    this.message.set(null);
    try {
      const { me } = await this.session.signIn(this.form.getRawValue());
      await this.router.navigateByUrl(safeReturn(this.from()) ?? landingFor(me?.roles ?? []));
    } catch (error) {
      const problem = toProblem(error);
      const text = applyProblem(this.form, problem);
      this.message.set(problem.code === 'wrong-credentials' ? `${problem.title}. ${text}` : text);
    } finally {
      this.isBusy.set(false);
    }
  }
}
