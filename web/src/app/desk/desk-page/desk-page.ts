import { HttpClient, httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { map } from 'rxjs';
import type { Desk } from '@shared/contract';
import { clock, dayAndClock } from '../../core/dates';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { SessionStore } from '../../core/session/session-store';
import { CallState, errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { deskCounts, matterCount, matterText, quietText } from '../desk-words';

/** The admin's first screen: what needs somebody, and the circle in numbers. */
@Component({
  selector: 'db-desk-page',
  imports: [
    DayLabelPipe,
    EmptyState,
    MatButton,
    MatIcon,
    MatProgressBar,
    PageHeader,
    ProblemNote,
    RouterLink,
  ],
  templateUrl: './desk-page.html',
  styleUrl: './desk-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DeskPage {
  private readonly http = inject(HttpClient);
  private readonly session = inject(SessionStore);

  protected readonly found = httpResource<Desk>(() => '/api/desk');
  protected readonly desk = computed(() => (this.found.hasValue() ? this.found.value() : null));
  protected readonly problem = computed(() => errorText(this.found.error()));
  protected readonly resending = new CallState();
  protected readonly done = signal('');

  private readonly zone = this.session.circleZone();
  protected readonly circleName = this.session.circleName;
  protected readonly matters = computed(() => matterCount(this.desk()));
  protected readonly sub = computed(() => {
    const desk = this.desk();
    return desk ? matterText(desk) : 'What needs somebody in the circle.';
  });
  protected readonly counts = computed(() => deskCounts(this.desk()));
  protected readonly quiet = computed(() => quietText(this.desk()));
  /** When this was looked at; a new answer, a new time. */
  protected readonly lookedAt = computed(() => {
    this.desk();
    return clock(new Date().toISOString(), this.zone);
  });

  protected at(instant: string | null): string {
    return instant ? dayAndClock(instant, this.zone) : '';
  }

  protected async resend(mail: Desk['failedMail'][number]): Promise<void> {
    this.done.set('');
    const call = this.http.post(`/api/desk/mail/${mail.id}/resend`, {}).pipe(map(() => true));
    const isSent = await this.resending.run(call);
    if (isSent) this.done.set(`The mail to ${mail.to} is in the queue again.`);
    // Also after a refusal: somebody else may have sent it again meanwhile.
    this.found.reload();
  }
}
