import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  untracked,
} from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatRadioModule } from '@angular/material/radio';
import { MatOption, MatSelect } from '@angular/material/select';
import type { Blackout, BlackoutPreview } from '@shared/contract';
import { map, startWith } from 'rxjs';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { EditPage } from '../../ui/edit-page';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { dateIn } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { usStates } from '../../ui/us-states';
import { blackoutAnswers, bodyOf, choiceOf, fillAnswers, renamedFields } from '../blackout-answers';
import { nextDays } from '../blackout-words';
import { BlackoutsApi } from '../blackouts-api';
import { movesAccepted } from '../moves-dialog/moves-dialog';
import { canBeObserved } from '../observed-rule';
import { monthNames, nthNames, weekdayNames } from '../yearly-rule';

/** How many of its days the form offers for lifting: some years of a rule, some weeks of a range. */
const offered = { yearly: 5, range: 31, date: 0 };

/** Enter or change a blackout. What saving would move is shown first, and asked. */
@Component({
  selector: 'db-blackout-form',
  imports: [
    DayLabelPipe,
    FieldMessagePipe,
    MatButton,
    MatCheckbox,
    MatFormFieldModule,
    MatInput,
    MatOption,
    MatProgressBar,
    MatRadioModule,
    MatSelect,
    NextAction,
    PageHeader,
    ProblemNote,
    ReactiveFormsModule,
  ],
  templateUrl: './blackout-form.html',
  styleUrl: './blackout-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BlackoutForm extends EditPage<Blackout> {
  private readonly api = inject(BlackoutsApi);
  private readonly dialog = inject(MatDialog);

  /** From the address of a new one: the day and the kind it begins with. */
  readonly date = input<string>();
  readonly kind = input<string>();
  /** A day that may be lifted, from the calendar. */
  readonly lift = input<string>();

  private readonly today = dateIn(inject(SessionStore).circleZone(), new Date());
  protected readonly form = blackoutAnswers();
  protected readonly monthNames = monthNames;
  protected readonly weekdayNames = weekdayNames;
  protected readonly nthNames = [...nthNames];
  protected readonly usStates = usStates;
  protected readonly days = Array.from({ length: 31 }, (_none, index) => index + 1);

  private readonly named = rxResource({ stream: () => this.api.names() });
  protected readonly carriers = computed(() => (this.named.hasValue() ? this.named.value().carriers : []));
  protected readonly counters = computed(() => (this.named.hasValue() ? this.named.value().counters : []));
  protected readonly isGone = computed(
    () => this.id() !== undefined && this.loaded.status() === 'resolved' && this.seen() === null,
  );
  protected readonly problem = computed(() => errorText(this.loaded.error() ?? this.named.error()));
  protected readonly value = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { requireSync: true },
  );
  protected readonly canObserve = computed(() => {
    this.value();
    const choice = choiceOf(this.form);
    return choice !== null && canBeObserved(choice);
  });
  /** Its coming days with whether each is lifted. */
  protected readonly coming = computed(() => {
    const { kind, liftedDates } = this.value();
    const body = bodyOf(this.form, this.seen());
    const span = {
      kind,
      startDate: body.startDate ?? null,
      endDate: body.endDate ?? null,
      rules: body.rules ?? null,
      liftedDates: [],
    };
    if (kind === 'range' && (!span.startDate || !span.endDate)) return [];
    const days = nextDays(span, this.today, offered[kind]);
    const extra = [...liftedDates.filter((day) => day >= this.today), this.lift() ?? ''].filter(Boolean);
    const all = kind === 'date' ? [] : [...new Set([...days, ...extra])].toSorted();
    return all.map((day) => ({ day, isLifted: liftedDates.includes(day) }));
  });

  constructor() {
    super();
    effect(() => {
      const seen = this.seen();
      untracked(() => (seen ? fillAnswers(this.form, seen) : this.begin()));
    });
  }

  protected override fetch(id: string) {
    return this.api.find(Number(id));
  }

  protected setLifted(day: string, isLifted: boolean): void {
    const { liftedDates } = this.form.controls;
    const others = liftedDates.value.filter((one) => one !== day);
    liftedDates.setValue(isLifted ? [...others, day].toSorted() : others);
    liftedDates.markAsDirty();
  }

  protected async save(): Promise<void> {
    if (!this.maySend()) return;
    const seen = this.seen();
    const body = bodyOf(this.form, seen);
    const renamed = renamedFields(this.form);
    const preview = await this.saving.save(this.api.preview(body, seen?.id), this.form, renamed);
    if (!preview) return this.showFirstError();
    if (!(await this.isAccepted(`Save “${body.title}”?`, preview, false))) return;
    const call = seen ? this.api.change(seen, body) : this.api.add(body);
    const saved = await this.saving.save(call, this.form, renamed);
    if (saved) await this.leave(`“${saved.title}” is saved.`, '/blackouts');
  }

  protected async remove(seen: Blackout): Promise<void> {
    const preview = await this.saving.save(this.api.preview(null, seen.id), this.form);
    if (!preview || !(await this.isAccepted(`Remove “${seen.title}”?`, preview, true))) return;
    const call = this.api.remove(seen).pipe(map(() => true));
    if (await this.saving.save(call, this.form))
      await this.leave(`“${seen.title}” is removed.`, '/blackouts');
  }

  protected override again(): void {
    super.again();
    this.named.reload();
  }

  private isAccepted(title: string, preview: BlackoutPreview, isRemoval: boolean): Promise<boolean> {
    return movesAccepted(this.dialog, { title, preview, isRemoval });
  }

  private begin(): void {
    const date = this.date() ?? '';
    const kind = this.kind() === 'yearly' ? 'yearly' : 'date';
    const from = date || this.today;
    this.form.patchValue({
      kind,
      startDate: date,
      month: Number(from.slice(5, 7)),
      day: Number(from.slice(8)),
    });
  }
}
