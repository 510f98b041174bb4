import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, resource, signal } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { Router, RouterLink } from '@angular/router';
import { firstValueFrom } from 'rxjs';
import type { DemoInfo } from '@shared/contract';
import { toProblem } from '../../core/http/problem';
import { landingFor } from '../../core/session/landing-for';
import { SessionStore } from '../../core/session/session-store';
import { PlainFrame } from '../../layout/plain-frame/plain-frame';
import { ProblemNote } from '../../ui/problem-note/problem-note';

/** The demo's way in: each account with one tap, and the mailbox where its mails arrive. */
@Component({
  selector: 'db-demo-page',
  imports: [MatIcon, PlainFrame, ProblemNote, RouterLink],
  templateUrl: './demo-page.html',
  styleUrl: './demo-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DemoPage {
  private readonly http = inject(HttpClient);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);

  private readonly demo = resource({ loader: () => firstValueFrom(this.http.get<DemoInfo>('/api/demo')) });
  protected readonly info = computed(() => (this.demo.hasValue() ? this.demo.value() : null));
  protected readonly isBusy = signal(false);
  private readonly failure = signal<string | null>(null);
  protected readonly message = computed(() => {
    if (this.failure()) return this.failure();
    return this.demo.error() ? 'There is no demo here.' : null;
  });

  protected async enter(email: string, password: string): Promise<void> {
    if (this.isBusy()) return;
    this.isBusy.set(true);
    this.failure.set(null);
    try {
      const { me } = await this.session.signIn({ email, password });
      await this.router.navigateByUrl(landingFor(me?.roles ?? []));
    } catch (error) {
      this.failure.set(toProblem(error).detail ?? 'That did not work.');
    } finally {
      this.isBusy.set(false);
    }
  }
}
