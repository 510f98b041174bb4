import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatSelectModule } from '@angular/material/select';
import { Router } from '@angular/router';
import { forkJoin } from 'rxjs';
import type { Parcel } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { CircleLists } from '../../ui/circle-lists';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { addDays, dateIn, isoWeekday } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { SaveState } from '../../ui/save-state';
import { RunsApi } from '../runs-api';

/** A run by hand: who drives on which day, with which parcels. It is a proposal until it is confirmed. */
@Component({
  selector: 'db-new-run',
  providers: [CircleLists],
  imports: [
    FieldMessagePipe,
    MatButton,
    MatFormFieldModule,
    MatInput,
    MatProgressBar,
    MatSelectModule,
    NextAction,
    PageHeader,
    ProblemNote,
    ReactiveFormsModule,
  ],
  templateUrl: './new-run.html',
  styles: `
    .fields {
      max-width: 560px;
      display: grid;
      gap: 16px;
      margin-bottom: 20px;
    }
    @media (max-width: 760px) {
      :host {
        display: block;
        padding-bottom: 90px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NewRun {
  private readonly api = inject(RunsApi);
  protected readonly lists = inject(CircleLists);
  private readonly router = inject(Router);
  private readonly session = inject(SessionStore);
  protected readonly today = dateIn(this.session.circleZone(), new Date());
  private readonly choices = rxResource({
    stream: () => forkJoin({ drivers: this.api.drivers(), waiting: this.api.waitingParcels() }),
  });
  protected readonly isLoading = computed(() => this.choices.isLoading());
  protected readonly problem = computed(() => errorText(this.choices.error()) ?? this.lists.problem());
  protected readonly drivers = computed(() => (this.choices.hasValue() ? this.choices.value().drivers : []));
  protected readonly form = inject(NonNullableFormBuilder).group({
    coordinatorId: [this.session.has('coordinator') ? (this.session.me()?.id ?? 0) : 0, Validators.min(1)],
    date: [nextWeekday(this.today), Validators.required],
    counterId: [0],
    parcelIds: [[] as number[]],
  });
  private readonly date = toSignal(this.form.controls.date.valueChanges, {
    initialValue: this.form.controls.date.value,
  });
  protected readonly joinable = computed(() =>
    (this.choices.hasValue() ? this.choices.value().waiting : []).filter((parcel) =>
      fits(parcel, this.date()),
    ),
  );
  protected readonly saving = new SaveState();

  protected reload(): void {
    this.choices.reload();
    this.lists.reload();
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.busy()) return;
    const { counterId: given, ...value } = this.form.getRawValue();
    const chosen = this.joinable().filter((parcel) => value.parcelIds.includes(parcel.id));
    const counterId = given || chosen[0]?.dropOff.counterId;
    const body = {
      ...value,
      parcelIds: chosen.map(({ id }) => id),
      ...(counterId === undefined ? {} : { counterId }),
    };
    const run = await this.saving.save(this.api.create(body), this.form);
    if (run) await this.router.navigate(['/runs', run.id]);
  }
}

/** Booked on the day or left open over it, and on no run. */
const fits = (parcel: Parcel, date: string): boolean =>
  parcel.run === null &&
  parcel.state !== 'on-hold' &&
  (parcel.shipDate === date ||
    (parcel.flexible !== null && parcel.flexible.from <= date && date <= parcel.flexible.to));

function nextWeekday(date: string): string {
  let next = addDays(date, 1);
  while (isoWeekday(next) > 4) next = addDays(next, 1);
  return next;
}
