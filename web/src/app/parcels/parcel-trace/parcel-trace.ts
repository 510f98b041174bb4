import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import type { DaysAnswer, TemperatureUnit } from '@shared/contract';
import { TraceSheet } from '../../ui/box-trace/trace-sheet';
import { errorText } from '../../ui/call-state';
import { ParcelsApi } from '../parcels-api';

/** Asks for the box trace of one day of a parcel, and again when the days were read again. */
@Component({
  selector: 'db-parcel-trace',
  imports: [TraceSheet],
  template: `<db-trace-sheet
    [answer]="traced()"
    [isLoading]="trace.isLoading()"
    [problem]="problem()"
    [unit]="unit()"
    (again)="trace.reload()"
  />`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelTrace {
  private readonly api = inject(ParcelsApi);

  readonly parcelId = input.required<number>();
  readonly date = input.required<string>();
  /** The strip the day was chosen from: a new one makes the trace stale. */
  readonly answer = input.required<DaysAnswer>();
  readonly unit = input<TemperatureUnit>('F');

  protected readonly trace = rxResource({
    params: () => ({ id: this.parcelId(), date: this.date(), answer: this.answer() }),
    stream: ({ params }) => this.api.trace(params.id, params.date),
  });
  protected readonly traced = computed(() => (this.trace.hasValue() ? this.trace.value() : null));
  protected readonly problem = computed(() => errorText(this.trace.error()));
}
