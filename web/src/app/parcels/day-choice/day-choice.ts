import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  linkedSignal,
  output,
  viewChild,
} from '@angular/core';
import { FormControl, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import type { DaysAnswer, DayVerdict, Parcel, TemperatureUnit } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { DayReasons } from '../../ui/day-reasons/day-reasons';
import { bestDay } from '../../ui/day-strip/best-day';
import { DayStrip } from '../../ui/day-strip/day-strip';
import { focusFirstError } from '../../ui/focus-first-error';
import { NextAction } from '../../ui/next-action/next-action';
import { PlanningAid } from '../../ui/planning-aid/planning-aid';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { revealOnPhone } from '../../ui/reveal-on-phone';
import type { ParcelSteps } from '../parcel-steps';
import { ParcelTrace } from '../parcel-trace/parcel-trace';
import { dayOffer } from './day-offer';

export interface DayBooking {
  readonly date: string;
  readonly acceptTight?: string;
}

/** As few characters as the contract takes for an acceptance. */
const fewestWords = 10;

/**
 * The strip of a parcel, the reasons of the chosen day and what can be done with it; beside and below it there is
 * room for more (`[side]`, `[below]`).
 */
@Component({
  selector: 'db-day-choice',
  imports: [
    DayReasons,
    DayStrip,
    FieldMessagePipe,
    MatButton,
    MatFormFieldModule,
    MatInput,
    NextAction,
    ParcelTrace,
    PlanningAid,
    ProblemNote,
    ReactiveFormsModule,
  ],
  templateUrl: './day-choice.html',
  styleUrl: './day-choice.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DayChoice {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);

  readonly parcel = input.required<Parcel>();
  readonly answer = input.required<DaysAnswer>();
  readonly steps = input.required<ParcelSteps>();
  /** The date at the drop-off counter. */
  readonly today = input.required<string>();
  /** The day to begin with, when it is in view. */
  readonly wanted = input<string>();
  readonly unit = input<TemperatureUnit>('F');
  readonly busy = input(false);
  readonly message = input<string | null>(null);
  /** What the button beside the message does, when there is one. */
  readonly retry = input<string>();
  readonly book = output<DayBooking>();
  readonly pack = output();
  readonly takeOff = output();
  readonly leaveOpen = output();
  readonly again = output();
  /** Another day is looked at: what was said of the last one is over. */
  readonly looked = output();
  private readonly reasons = viewChild<ElementRef<HTMLElement>>('reasons');

  protected readonly words = new FormControl('', {
    nonNullable: true,
    validators: [Validators.required, Validators.minLength(fewestWords), Validators.maxLength(500)],
  });
  /** The booked day at first, else the best one; a choice stays while its day is in view. */
  protected readonly chosen = linkedSignal<{ dates: readonly string[]; first: string | null }, string | null>(
    {
      source: () => {
        const { days } = this.answer();
        const inView = (date: string | null | undefined) => days.find((day) => day.date === date)?.date;
        return {
          dates: days.map((day) => day.date),
          first: inView(this.parcel().shipDate) ?? inView(this.wanted()) ?? bestDay(days),
        };
      },
      computation: ({ dates, first }, before) =>
        before?.value && dates.includes(before.value) ? before.value : first,
    },
  );
  protected readonly day = computed<DayVerdict | null>(
    () => this.answer().days.find((day) => day.date === this.chosen()) ?? null,
  );
  protected readonly offer = computed(() => {
    const day = this.day();
    return day ? dayOffer(this.parcel(), day, this.today()) : null;
  });

  protected look(date: string): void {
    this.chosen.set(date);
    this.looked.emit();
    revealOnPhone(this.reasons()?.nativeElement);
  }

  protected act(): void {
    const [day, offer] = [this.day(), this.offer()];
    if (!day || !offer || this.busy()) return;
    if (offer.kind === 'pack') this.pack.emit();
    if (offer.kind !== 'book') return;
    if (!offer.needsWords) return this.book.emit({ date: day.date });
    this.words.setValue(this.words.value.trim());
    this.words.markAsTouched();
    if (this.words.invalid) return focusFirstError(this.host.nativeElement);
    this.book.emit({ date: day.date, acceptTight: this.words.value });
  }
}
