import {
  afterNextRender,
  afterRenderEffect,
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  ElementRef,
  inject,
  input,
  signal,
  viewChild,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import type { RangeF, TemperatureUnit, TraceRow } from '@shared/contract';
import { rangeText } from '../../core/temperature';
import type { TraceChart } from './trace-chart';
import { traceLegs, traceLines, tracePoints, traceScale, traceSummary, traceTicks } from './trace-model';

/** Under this many pixels the clock is told every six hours instead of every three. */
const narrowBelow = 620;
/** Pixels that a label of the clock needs. */
const tickWidth = 52;

/**
 * The box trace: the air in the box hour by hour as planned and a day late, with one forecast error as a ribbon, the
 * planned band as a zone, the endurance limits as lines and each leg numbered. A table of the same stands behind it.
 */
@Component({
  selector: 'db-box-trace',
  imports: [MatButton, MatIcon],
  templateUrl: './box-trace.html',
  styleUrl: './box-trace.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoxTrace {
  readonly rows = input.required<readonly TraceRow[]>();
  readonly band = input<RangeF | null>(null);
  readonly endurance = input<RangeF | null>(null);
  readonly unit = input<TemperatureUnit>('F');

  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly surface = viewChild<ElementRef<HTMLElement>>('surface');
  private readonly width = signal(0);
  private readonly library = signal<typeof TraceChart | null>(null);
  private chart: { readonly host: HTMLElement; readonly drawing: TraceChart } | null = null;

  protected readonly isTable = signal(false);
  /** The instant under the pointer. */
  private readonly pointed = signal<number | null>(null);
  protected readonly legs = computed(() => traceLegs(this.rows()));
  protected readonly lines = computed(() => traceLines(this.rows(), this.unit()));
  protected readonly summary = computed(() => traceSummary(this.rows(), this.unit()));
  protected readonly hasLate = computed(() => this.rows().some((row) => row.lateF !== null));
  protected readonly bandText = computed(() => this.textOf(this.band()));
  protected readonly enduranceText = computed(() => this.textOf(this.endurance()));
  /** The row nearest to the pointer, and at which side of the picture it leaves the pointer free. */
  protected readonly tip = computed(() => {
    const [at, lines] = [this.pointed(), this.lines()];
    const [first, last] = [lines[0], lines.at(-1)];
    if (at === null || !first || !last) return null;
    const off = (atMs: number): number => Math.abs(atMs - at);
    const line = lines.reduce((best, one) => (off(one.atMs) < off(best.atMs) ? one : best), first);
    return { line, isLeft: at > (first.atMs + last.atMs) / 2 };
  });
  private readonly ticks = computed(() => {
    const lines = this.lines();
    const spanMs = (lines.at(-1)?.atMs ?? 0) - (lines[0]?.atMs ?? 0);
    const leastGapMs = (spanMs / Math.max(1, this.width())) * tickWidth;
    return traceTicks(this.rows(), this.width() < narrowBelow ? 6 : 3, leastGapMs);
  });
  private readonly picture = computed(() => ({
    width: this.width(),
    points: tracePoints(this.rows(), this.unit()),
    legs: this.legs(),
    ticks: this.ticks(),
    scale: traceScale(this.rows(), [this.band(), this.endurance()], this.unit()),
    band: this.band(),
    endurance: this.endurance(),
    unit: this.unit(),
  }));

  constructor() {
    const destroyed = inject(DestroyRef);
    afterNextRender(() => {
      if (typeof ResizeObserver === 'undefined') return;
      const watcher = new ResizeObserver(([entry]) =>
        this.width.set(Math.round(entry?.contentRect.width ?? 0)),
      );
      watcher.observe(this.host.nativeElement);
      destroyed.onDestroy(() => watcher.disconnect());
      void import('./trace-chart').then((chunk) => this.library.set(chunk.TraceChart));
    });
    afterRenderEffect(() => this.draw());
    destroyed.onDestroy(() => this.chart?.drawing.dispose());
  }

  private draw(): void {
    const [Chart, host, picture] = [this.library(), this.surface()?.nativeElement, this.picture()];
    if (this.chart && this.chart.host !== host) {
      this.chart.drawing.dispose();
      this.chart = null;
    }
    if (!Chart || !host || picture.width === 0) return;
    if (!this.chart) {
      this.chart = { host, drawing: new Chart(host) };
      this.chart.drawing.onPoint((atMs) => this.pointed.set(atMs));
    }
    this.chart.drawing.draw(picture);
  }

  private textOf(range: RangeF | null): string | null {
    return range ? rangeText(range, this.unit()) : null;
  }
}
