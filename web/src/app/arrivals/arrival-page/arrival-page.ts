import { DOCUMENT } from '@angular/common';
import { ChangeDetectionStrategy, Component, computed, effect, inject, input, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import type { ReportBody } from '@shared/contract';
import { clock, dateAt, dayLabel } from '../../core/dates';
import { isProblemCode } from '../../core/http/problem';
import { PageTitles } from '../../core/page-titles';
import { BrandMark } from '../../ui/brand-mark/brand-mark';
import { CallState, errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { canReport, headline, reportText } from '../arrival-words';
import { ArrivalsApi } from '../arrivals-api';
import { MorningsChoice, type MorningSaid } from '../mornings-choice/mornings-choice';
import { ReportForm } from '../report-form/report-form';

/** The buyer's page, opened by a link without signing in: when, where, what to bring, which mornings, how it went. */
@Component({
  selector: 'db-arrival-page',
  imports: [
    BrandMark,
    EmptyState,
    MatButton,
    MatProgressBar,
    MorningsChoice,
    NextAction,
    ProblemNote,
    ReportForm,
    RouterLink,
  ],
  templateUrl: './arrival-page.html',
  styleUrl: './arrival-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ArrivalPage {
  private readonly api = inject(ArrivalsApi);
  private readonly document = inject(DOCUMENT);

  readonly token = input.required<string>();
  protected readonly loading = rxResource({
    params: () => this.token(),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly arrival = computed(() => (this.loading.hasValue() ? this.loading.value() : null));
  protected readonly problem = computed(() => errorText(this.loading.error()));
  protected readonly isUnknown = computed(() => isProblemCode(this.loading.error(), 'not-found'));
  protected readonly head = computed(() => {
    const arrival = this.arrival();
    return arrival && headline(arrival);
  });
  protected readonly canReport = computed(() => {
    const arrival = this.arrival();
    return arrival !== null && canReport(arrival);
  });
  /** Once it has arrived the head of the page tells the outcome; the report is shown again only for its words. */
  protected readonly hasMoreToTell = computed(() => {
    const arrival = this.arrival();
    return arrival?.report != null && (arrival.status !== 'arrived' || arrival.report.text !== '');
  });
  protected readonly saving = new CallState();
  protected readonly saved = signal('');
  protected readonly reported = reportText;
  protected readonly stepWord = { done: ' (done)', now: ' (now)', next: ' (to come)' } as const;

  constructor() {
    const titles = inject(PageTitles);
    effect(() => {
      const head = this.head();
      if (head) titles.set(`Arrival: ${head.large.join(', ')}`);
    });
  }

  protected when(instant: string, zone: string): string {
    return `${dayLabel(dateAt(instant, zone), 'medium')}, ${clock(instant, zone)}`;
  }

  protected async sayMorning(said: MorningSaid): Promise<void> {
    const answer = await this.saving.run(this.api.sayMornings(this.token(), [said]));
    if (!answer) {
      this.loading.reload();
      return;
    }
    this.loading.set(answer);
    this.saved.set(
      `Kept: ${dayLabel(said.date, 'medium')} ${said.suits ? 'suits you' : 'does not suit you'}. The breeder is told.`,
    );
  }

  protected async report(report: ReportBody): Promise<void> {
    const answer = await this.saving.run(this.api.report(this.token(), report));
    if (answer) this.loading.set(answer);
  }

  protected goTo(id: string): void {
    const section = this.document.getElementById(id);
    section?.scrollIntoView({ block: 'start', behavior: 'smooth' });
    section?.querySelector<HTMLElement>('button, input, [tabindex]')?.focus({ preventScroll: true });
  }
}
