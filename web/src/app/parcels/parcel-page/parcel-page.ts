import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  linkedSignal,
  signal,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { firstValueFrom, of, type Observable } from 'rxjs';
import type { DaysAnswer, DayVerdict, Parcel, ParcelPatch, Problem } from '@shared/contract';
import { dayAndClock } from '../../core/dates';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { PageTitles } from '../../core/page-titles';
import { SessionStore } from '../../core/session/session-store';
import { UnitPreference } from '../../core/unit-preference';
import { CallState, errorText, problemText } from '../../ui/call-state';
import { confirmed } from '../../ui/confirm-dialog/confirm-dialog';
import { DayReasons } from '../../ui/day-reasons/day-reasons';
import { MoneyPipe } from '../../ui/money-pipe';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { dateIn } from '../../ui/plain-dates';
import { PlanningAid } from '../../ui/planning-aid/planning-aid';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { StateChip } from '../../ui/state-chip/state-chip';
import { BuyerCard } from '../buyer-card/buyer-card';
import { DayChoice, type DayBooking } from '../day-choice/day-choice';
import { needOf, reportWords } from '../next-need';
import { ParcelFacts } from '../parcel-facts/parcel-facts';
import { ParcelHistory } from '../parcel-history/parcel-history';
import { parcelSteps } from '../parcel-steps';
import { parcelTitle } from '../parcel-title';
import { ParcelsApi } from '../parcels-api';
import { SpanDialog, type SpanQuestion } from '../span-dialog/span-dialog';
import { TrackingForm } from '../tracking-form/tracking-form';
import { verdictOf, withVerdict } from './verdict-of';

/** Until a parcel is packed its days are in view; afterwards the verdict it was booked on. */
const stillPlanned = ['draft', 'seeking', 'booked', 'on-hold'];

/** One parcel: what it needs next, its days with their reasons, and everything known of it. */
@Component({
  selector: 'db-parcel-page',
  imports: [
    BuyerCard,
    DayChoice,
    DayLabelPipe,
    DayReasons,
    MatButton,
    MatIcon,
    MatProgressBar,
    MoneyPipe,
    NextAction,
    NgTemplateOutlet,
    PageHeader,
    ParcelFacts,
    ParcelHistory,
    PlanningAid,
    ProblemNote,
    RouterLink,
    StateChip,
    TrackingForm,
  ],
  templateUrl: './parcel-page.html',
  styleUrl: './parcel-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelPage {
  private readonly api = inject(ParcelsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly titles = inject(PageTitles);
  protected readonly unit = inject(UnitPreference).unit;

  readonly id = input.required<string>();
  /** A day to begin with, from the address: the one that was looked at in a route check. */
  readonly day = input<string>();

  protected readonly loading = rxResource({
    params: () => Number(this.id()),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly problem = computed(() => errorText(this.loading.error()));
  protected readonly parcel = computed(() => (this.loading.hasValue() ? this.loading.value() : null));
  /** What the days and the history are asked for again by: each version of the parcel has its own. */
  private readonly edition = computed(() => {
    const parcel = this.parcel();
    return parcel
      ? { id: parcel.id, version: parcel.version, isPlanned: stillPlanned.includes(parcel.state) }
      : undefined;
  });
  protected readonly isPlanned = computed(() => this.edition()?.isPlanned ?? true);
  protected readonly isGone = computed(() =>
    ['handed-over', 'arrived', 'closed'].includes(this.parcel()?.state ?? ''),
  );
  protected readonly days = rxResource({
    params: this.edition,
    stream: ({ params }) => (params.isPlanned ? this.api.days(params.id) : of(null)),
  });
  protected readonly daysProblem = computed(() => errorText(this.days.error()));
  protected readonly history = rxResource({
    params: this.edition,
    stream: ({ params }) => this.api.history(params.id),
  });
  protected readonly entries = computed(() => (this.history.hasValue() ? this.history.value() : []));
  protected readonly historyProblem = computed(() => errorText(this.history.error()));
  private readonly refused = signal<DayVerdict | null>(null);
  /** The last answer stays in view while the next one is on its way, so that nothing jumps after a booking. */
  private readonly lastAnswer = linkedSignal<DaysAnswer | null | undefined, DaysAnswer | null>({
    source: () => (this.days.hasValue() ? this.days.value() : undefined),
    computation: (now, before) =>
      now === undefined ? (this.days.isLoading() && before?.value) || null : now,
  });
  protected readonly answer = computed(() => {
    const answer = this.lastAnswer();
    return answer && { ...answer, days: withVerdict(answer.days, this.refused()) };
  });
  protected readonly title = computed(() => {
    const parcel = this.parcel();
    return parcel ? parcelTitle(parcel) : 'Parcel';
  });
  protected readonly today = computed(() =>
    dateIn(this.parcel()?.dropOff.zone ?? this.session.circleZone(), new Date()),
  );
  protected readonly need = computed(() => {
    const parcel = this.parcel();
    return parcel ? needOf(parcel, this.today()).text : null;
  });
  /** What is said below anyway is not said twice: the reason of a hold, and what is next once it is packed. */
  protected readonly sub = computed(() => {
    if (this.parcel()?.state === 'on-hold') return 'Choose a new day.';
    return this.isPlanned() ? this.need() : null;
  });
  protected readonly report = computed(() => {
    const parcel = this.parcel();
    return parcel && reportWords(parcel);
  });
  protected readonly reportedAt = computed(() => {
    const parcel = this.parcel();
    return parcel?.report ? dayAndClock(parcel.report.at, parcel.destination.zone) : '';
  });
  protected readonly steps = computed(() => {
    const parcel = this.parcel();
    return parcel && parcelSteps(parcel, { id: this.session.me()?.id ?? 0, roles: this.session.roles() });
  });
  /** What can be done without the strip: it is not needed any more, or its days could not be read just now. */
  protected readonly hasQuickStep = computed(() => {
    const can = this.steps();
    return Boolean(can && (can.canPack || can.canTakeOffDay || can.canUnpack || can.canClose));
  });
  /** Choosing a day and everything else: each says its trouble where it was asked for. */
  protected readonly booking = new CallState();
  protected readonly changing = new CallState();
  protected readonly isBusy = computed(() => this.booking.busy() || this.changing.busy());
  protected readonly isStale = signal(false);

  constructor() {
    effect(() => {
      const parcel = this.parcel();
      if (parcel) this.titles.set(parcelTitle(parcel));
    });
  }

  protected async bookDay(parcel: Parcel, booking: DayBooking): Promise<void> {
    await this.make(this.booking, this.api.book(parcel, booking));
  }

  protected async takeOff(parcel: Parcel): Promise<void> {
    const text = parcel.shipDate
      ? `${parcel.code} leaves its day${parcel.run ? ` and ${parcel.run.coordinatorName}'s run` : ''}. The buyer is told.`
      : `${parcel.code} is not left open any more.`;
    const isSure = await confirmed(this.dialog, {
      title: 'Take it off?',
      text,
      yes: 'Take it off',
      no: 'Leave it',
    });
    if (isSure) await this.make(this.booking, this.api.unbook(parcel));
  }

  protected async leaveOpen(parcel: Parcel): Promise<void> {
    const data: SpanQuestion = { parcel, today: this.today() };
    const opened = this.dialog.open<SpanDialog, SpanQuestion, Parcel>(SpanDialog, { data, width: '480px' });
    const saved = await firstValueFrom(opened.afterClosed());
    if (saved) this.show(saved);
  }

  protected async change(parcel: Parcel, patch: ParcelPatch): Promise<void> {
    await this.make(this.changing, this.api.change(parcel, patch));
  }

  protected async cancel(parcel: Parcel): Promise<void> {
    const isSure = await confirmed(this.dialog, {
      title: `Cancel ${parcel.code}?`,
      text: `It leaves its day${parcel.run ? ' and its run' : ''}, and ${parcel.buyer.name} is told. This cannot be taken back.`,
      yes: 'Cancel the parcel',
      no: 'Keep it',
    });
    if (isSure) await this.change(parcel, { state: 'cancelled' });
  }

  /** A stale page stays stale, whatever day is looked at. */
  protected forgetRefusal(): void {
    if (!this.isStale()) this.booking.say(null);
  }

  protected reload(): void {
    this.isStale.set(false);
    this.refused.set(null);
    this.booking.say(null);
    this.changing.say(null);
    this.loading.reload();
  }

  private async make(state: CallState, call: Observable<Parcel>): Promise<void> {
    const saved = await state.run(call, (problem) => this.explain(problem));
    if (saved) this.show(saved);
  }

  private show(parcel: Parcel): void {
    this.refused.set(null);
    this.isStale.set(false);
    this.loading.set(parcel);
  }

  private explain(problem: Problem): string {
    this.isStale.set(problem.code === 'stale');
    if (problem.code === 'stale')
      return 'Somebody changed this parcel meanwhile. Load it as it is now, then try again.';
    this.refused.set(verdictOf(problem));
    return problemText(problem);
  }
}
