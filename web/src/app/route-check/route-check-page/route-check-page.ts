import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  type ElementRef,
  inject,
  linkedSignal,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatRadioModule } from '@angular/material/radio';
import { MatOption, MatSelect } from '@angular/material/select';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { debounceTime, filter, map, startWith } from 'rxjs';
import type { RouteCheck } from '@shared/contract';
import { contentsText } from '@shared/parcels/contents-text';
import { dayLabel } from '../../core/dates';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { applyProblem, toProblem } from '../../core/http/problem';
import { answersFromQuery, answersToQuery } from '../../core/route-answers';
import { SessionStore } from '../../core/session/session-store';
import { UnitPreference } from '../../core/unit-preference';
import { errorText } from '../../ui/call-state';
import { CircleLists } from '../../ui/circle-lists';
import { ContentsRows } from '../../ui/contents-rows/contents-rows';
import { CopyButton } from '../../ui/copy-button/copy-button';
import { DayReasons } from '../../ui/day-reasons/day-reasons';
import { TraceSheet } from '../../ui/box-trace/trace-sheet';
import { bestDay } from '../../ui/day-strip/best-day';
import { DayStrip } from '../../ui/day-strip/day-strip';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { HoldCounterField } from '../../ui/hold-counter-field/hold-counter-field';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { PlanningAid } from '../../ui/planning-aid/planning-aid';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { revealOnPhone } from '../../ui/reveal-on-phone';
import { answersOf, checkForm, questionOf } from '../check-form';
import { RouteCheckApi } from '../route-check-api';
import { countText, summaryText } from '../summary-text';

/** Typing settles before the question goes out; short enough that the answer still comes within a second. */
const settleMs = 250;

/** "When can you ship to me?": place and contents in, fourteen days out. Nothing is saved; the address keeps the answers. */
@Component({
  selector: 'db-route-check-page',
  imports: [
    ContentsRows,
    CopyButton,
    DayReasons,
    DayStrip,
    EmptyState,
    FieldMessagePipe,
    HoldCounterField,
    MatButton,
    MatFormFieldModule,
    MatInput,
    MatOption,
    MatProgressBar,
    MatRadioModule,
    MatSelect,
    NextAction,
    PageHeader,
    PlanningAid,
    ProblemNote,
    ReactiveFormsModule,
    RouterLink,
    TraceSheet,
  ],
  providers: [CircleLists],
  templateUrl: './route-check-page.html',
  styleUrl: './route-check-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RouteCheckPage {
  private readonly api = inject(RouteCheckApi);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  protected readonly lists = inject(CircleLists);
  protected readonly unit = inject(UnitPreference).unit;

  /** A breeder's parcels are dropped off at their own counter unless they say otherwise. */
  protected readonly hasOwnCounter = inject(SessionStore).has('breeder');
  private readonly query = this.route.snapshot.queryParamMap;
  protected readonly form = checkForm(answersFromQuery((key) => this.query.get(key)));
  protected readonly service = toSignal(
    this.form.controls.service.valueChanges.pipe(startWith(this.form.controls.service.value)),
    { requireSync: true },
  );
  private readonly question = signal<RouteCheck | null>(null);
  protected readonly check = rxResource({
    params: () => this.question() ?? undefined,
    stream: ({ params }) => this.api.ask(params),
  });
  /** The last answer stays in view while the next one is asked for. */
  protected readonly answer = linkedSignal<ReturnType<typeof this.present>, ReturnType<typeof this.present>>({
    source: () => this.present(),
    computation: (now, before) => (this.check.isLoading() ? (now ?? before?.value ?? null) : now),
  });
  protected readonly chosen = linkedSignal(() => {
    const days = this.answer()?.days ?? [];
    return bestDay(days);
  });
  protected readonly day = computed(
    () => this.answer()?.days.find((one) => one.date === this.chosen()) ?? null,
  );
  /** The trace of the day in view, asked for once there is an answer to the same question. */
  protected readonly trace = rxResource({
    params: () => {
      const [question, day] = [this.question(), this.day()];
      if (!question || !day?.inBox || day.verdict === 'far' || this.check.isLoading()) return undefined;
      return { ...question, from: day.date, days: 1, trace: true };
    },
    stream: ({ params }) => this.api.ask(params),
  });
  protected readonly traced = computed(() => (this.trace.hasValue() ? this.trace.value() : null));
  protected readonly traceProblem = computed(() => errorText(this.trace.error()));
  protected readonly counts = computed(() => countText(this.answer()?.days ?? []));
  protected readonly message = signal<string | null>(null);
  private readonly reasons = viewChild<ElementRef<HTMLElement>>('reasons');
  protected readonly summary = computed(() => {
    const answer = this.answer();
    const question = this.question();
    if (!answer || !question) return '';
    return summaryText(answer, { contents: this.contentsWords(question), service: question.service });
  });
  protected readonly parcelQuery = computed(() => {
    this.answer();
    return answersToQuery(answersOf(this.form, this.chosen()));
  });
  protected readonly bookText = computed(() => {
    const day = this.day();
    return day && day.verdict !== 'shut'
      ? `Book for ${dayLabel(day.date, 'medium')}`
      : 'Book a parcel like this';
  });

  constructor() {
    this.form.valueChanges
      .pipe(
        startWith(null),
        debounceTime(settleMs),
        map(() => questionOf(this.form)),
        takeUntilDestroyed(),
      )
      .subscribe((question) => this.ask(question));
    toObservable(this.lists.isReady)
      .pipe(filter(Boolean), takeUntilDestroyed())
      .subscribe(() => this.fillDefaults());
    effect(() => {
      const error = this.check.error();
      untracked(() => this.message.set(error ? applyProblem(this.form, toProblem(error), renamed) : null));
    });
  }

  protected look(date: string): void {
    this.chosen.set(date);
    revealOnPhone(this.reasons()?.nativeElement);
  }

  private present() {
    return this.check.hasValue() ? this.check.value() : null;
  }

  /** The same question twice is asked once. */
  private ask(question: RouteCheck | null): void {
    if (JSON.stringify(question) === JSON.stringify(this.question())) return;
    this.question.set(question);
    const queryParams = answersToQuery(answersOf(this.form, null));
    void this.router.navigate([], { relativeTo: this.route, queryParams, replaceUrl: true });
  }

  private fillDefaults(): void {
    const { boxId, dropOffCounterId } = this.form.controls;
    if (boxId.value === null) boxId.setValue(this.lists.boxes()[0]?.id ?? null);
    if (!this.hasOwnCounter && dropOffCounterId.value === null)
      dropOffCounterId.setValue(this.lists.dropOffCounters()[0]?.id ?? null);
  }

  private contentsWords(question: RouteCheck): string {
    const nameOf = (id: number) => this.lists.species().find((one) => one.id === id)?.commonName ?? 'animal';
    return contentsText(
      question.contents.map(({ speciesId, quantity }) => ({ quantity, commonName: nameOf(speciesId) })),
    );
  }
}

/** The API's paths where the form's differ. */
const renamed: Readonly<Record<string, string>> = {
  'destination.postalCode': 'postalCode',
  'destination.counterId': 'counterId',
  destination: 'counterId',
};
