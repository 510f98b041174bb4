import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  output,
  signal,
  viewChildren,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { MatTooltip } from '@angular/material/tooltip';
import type { DayVerdict, RangeF, TemperatureUnit } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { rangeText } from '../../core/temperature';
import { chanceNumber } from '../chance-text';
import { VerdictGlyph } from '../verdict-glyph/verdict-glyph';
import { rowGeometry, stripGeometry, wrapWords } from './strip-geometry';
import { dayName, dayNumbers, isOffered, roomText, shortWhy } from './strip-words';

/** Under this many pixels the strip turns: days run down, temperature runs across. */
const narrowBelow = 680;
const frame = { left: 40, top: 78, bottom: 236 };

/**
 * The fourteen-day strip: one column a day with the outdoor range, the in-box range inside it, the band behind, the
 * verdict's glyph and word and the run that goes. A radio group: arrows move, Enter or Space chooses.
 */
@Component({
  selector: 'db-day-strip',
  imports: [MatButton, MatIcon, MatTooltip, VerdictGlyph],
  templateUrl: './day-strip.html',
  styleUrl: './day-strip.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class DayStrip {
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);

  readonly days = input.required<readonly DayVerdict[]>();
  readonly band = input<RangeF | null>(null);
  readonly unit = input<TemperatureUnit>('F');
  /** The chosen day (`YYYY-MM-DD`), or null. */
  readonly chosen = input<string | null>(null);
  readonly choose = output<string>();

  private readonly width = signal(1040);
  private readonly stop = signal<string | null>(null);
  private readonly buttons = viewChildren<ElementRef<HTMLButtonElement>>('day');
  /** A far day's weather is at best known in part; half a range would look like a whole one. */
  private readonly drawn = computed(() =>
    this.days().map((day) => (day.verdict === 'far' ? { ...day, outdoor: null, inBox: null } : day)),
  );
  protected readonly isTable = signal(false);
  protected readonly isNarrow = computed(() => this.width() < narrowBelow);
  protected readonly wide = computed(() =>
    stripGeometry(this.drawn(), this.band(), this.unit(), { ...frame, width: this.width() }),
  );
  protected readonly rows = computed(() => rowGeometry(this.drawn(), this.band(), this.unit()));
  protected readonly bandText = computed(() => {
    const band = this.band();
    return band ? rangeText(band, this.unit()) : null;
  });
  /** Nobody has worked out the inside of the box yet: no bar, no column, no word of it. */
  protected readonly hasInBox = computed(() => this.days().some((day) => day.inBox !== null));
  protected readonly hasChance = computed(() =>
    this.days().some((day) => day.chance !== null && isOffered(day)),
  );
  protected readonly items = computed(() => this.days().map((day, index) => this.itemOf(day, index)));
  /** The one day that Tab reaches: where the arrows went, else the chosen one, else the first that can be booked. */
  protected readonly tabStop = computed(() => {
    const days = this.days();
    const wanted = [this.stop(), this.chosen(), days.find((day) => day.verdict !== 'shut')?.date];
    return wanted.find((date) => date != null && days.some((day) => day.date === date)) ?? days[0]?.date;
  });
  protected readonly view = computed(() => ({ width: this.width(), height: 350 }));

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      if (typeof ResizeObserver === 'undefined') return;
      const watcher = new ResizeObserver(([entry]) => {
        const width = Math.round(entry?.contentRect.width ?? 0);
        if (width > 0) this.width.set(width);
      });
      watcher.observe(this.host.nativeElement);
      destroyed.onDestroy(() => watcher.disconnect());
    });
  }

  protected onKey(event: KeyboardEvent, index: number): void {
    const last = this.days().length - 1;
    const target = {
      ArrowRight: index + 1,
      ArrowDown: index + 1,
      ArrowLeft: index - 1,
      ArrowUp: index - 1,
      Home: 0,
      End: last,
    }[event.key];
    if (target === undefined) return;
    event.preventDefault();
    const next = Math.min(Math.max(target, 0), last);
    this.stop.set(this.days()[next]?.date ?? null);
    this.buttons()[next]?.nativeElement.focus();
  }

  protected pick(date: string): void {
    this.stop.set(date);
    this.choose.emit(date);
  }

  private itemOf(day: DayVerdict, index: number) {
    const characters = Math.max(5, Math.floor((this.wide().columns[index]?.width ?? 60) / 6.4));
    const why = shortWhy(day);
    return {
      day,
      index,
      name: dayName(day),
      numbers: dayNumbers(day, this.unit()),
      weekday: dayLabel(day.date, 'weekday').slice(0, 3),
      number: Number(day.date.slice(8)),
      label: dayLabel(day.date, 'medium'),
      why,
      lines: wrapWords(why, characters),
      room: roomText(day),
      /** On a phone both stand in one line. */
      beside: [why, day.run ? `run, ${roomText(day)}` : ''].filter(Boolean).join('; '),
      outdoor: day.outdoor && day.verdict !== 'far' ? rangeText(day.outdoor, this.unit()) : '–',
      chance: day.chance !== null && isOffered(day) ? chanceNumber(day.chance) : '',
      inBox: day.inBox ? rangeText(day.inBox, this.unit()) : '–',
    };
  }
}
