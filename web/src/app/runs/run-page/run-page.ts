import { DOCUMENT } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  signal,
  type Type,
} from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatSelectModule } from '@angular/material/select';
import { firstValueFrom, forkJoin, of, type Observable } from 'rxjs';
import type { Parcel, Run, RunParcel, RunPatch } from '@shared/contract';
import { ClockPipe } from '../../core/clock-pipe';
import { dayLabel } from '../../core/dates';
import { PageTitles } from '../../core/page-titles';
import { SessionStore } from '../../core/session/session-store';
import { CallState, errorText, problemText } from '../../ui/call-state';
import { confirmed } from '../../ui/confirm-dialog/confirm-dialog';
import { MoneyPipe } from '../../ui/money-pipe';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { addDays, dateIn } from '../../ui/plain-dates';
import { PlanningAid } from '../../ui/planning-aid/planning-aid';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { RunMap } from '../../ui/run-map/run-map';
import type { MapPlace } from '../../ui/run-map/run-map-geometry';
import { StateChip } from '../../ui/state-chip/state-chip';
import { AboardDialog } from '../aboard-dialog/aboard-dialog';
import { CallOffDialog } from '../call-off-dialog/call-off-dialog';
import { HandOverDialog } from '../hand-over-dialog/hand-over-dialog';
import { NextStop } from '../next-stop/next-stop';
import {
  couldJoin,
  runActions,
  runNeed,
  runsFor,
  sharesOf,
  toldOnConfirmation,
  type RunAction,
} from '../run-actions';
import { RunChangeDialog, type RunChange } from '../run-change-dialog/run-change-dialog';
import { duration, load } from '../run-figures';
import { RunParcels, type ParcelWish } from '../run-parcels/run-parcels';
import { RunSheet } from '../run-sheet/run-sheet';
import { RunsApi, type TrackingEntry } from '../runs-api';

/** What a change of a run can draw on: the parcels that wait, and the other runs of the coming weeks. */
interface Around {
  readonly parcels: readonly Parcel[];
  readonly runs: readonly Run[];
}
const nothing: Around = { parcels: [], runs: [] };
const daysAhead = 28;

/** One run from proposal to hand-over: the drive, what is on it, what it costs, and the one thing to do next. */
@Component({
  selector: 'db-run-page',
  imports: [
    ClockPipe,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    MatProgressBar,
    MatSelectModule,
    MoneyPipe,
    NextAction,
    NextStop,
    PageHeader,
    PlanningAid,
    ProblemNote,
    ReactiveFormsModule,
    RunMap,
    RunParcels,
    RunSheet,
    StateChip,
  ],
  templateUrl: './run-page.html',
  styleUrl: './run-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunPage {
  private readonly api = inject(RunsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);
  private readonly document = inject(DOCUMENT);

  readonly id = input.required<string>();
  protected readonly loading = rxResource({
    params: () => Number(this.id()),
    stream: ({ params }) => this.api.get(params),
  });
  protected readonly run = computed(() => (this.loading.hasValue() ? this.loading.value() : null));
  protected readonly problem = computed(() => errorText(this.loading.error()));
  protected readonly isDriver = computed(() => this.session.has('coordinator', 'admin'));
  protected readonly actions = computed(() =>
    this.ofRun((run) => runActions(run, this.session.roles(), dateIn(run.zone, new Date())), []),
  );
  private readonly waiting = rxResource({
    params: () => ({ asks: this.can('change'), version: this.run()?.version }),
    stream: ({ params }) => (params.asks ? this.around() : of(nothing)),
  });
  private readonly known = computed(() => (this.waiting.hasValue() ? this.waiting.value() : nothing));
  protected readonly joinable = computed(() => this.ofRun((run) => couldJoin(this.known().parcels, run), []));
  /** Off a confirmed run a parcel is taken first, so only a proposal's can move straight on. */
  protected readonly targets = computed(() =>
    this.ofRun(
      (run) => (run.state === 'proposed' ? this.targetsOf(run) : new Map<number, Run[]>()),
      new Map(),
    ),
  );
  protected readonly isOnTheDay = computed(() =>
    this.ofRun(
      (run) =>
        this.isDriver() &&
        (run.state === 'underway' ||
          (run.state === 'confirmed' && run.date === dateIn(run.zone, new Date()))),
      false,
    ),
  );
  protected readonly title = computed(() =>
    this.ofRun((run) => `${dayLabel(run.date)}, ${run.coordinator.name}`, 'Run'),
  );
  protected readonly need = computed(() => this.ofRun(runNeed, ''));
  protected readonly drive = computed(() => this.ofRun((run) => duration(run.driveMinutes), ''));
  protected readonly miles = computed(() => this.ofRun((run) => `${Math.round(run.miles)} mi`, ''));
  protected readonly fill = computed(() => this.ofRun(load, { text: '', percent: 0, isOver: false }));
  protected readonly shares = computed(() => this.ofRun(sharesOf, []));
  protected readonly places = computed(() => this.ofRun(placesOf, []));
  protected readonly changing = new CallState();
  protected readonly isStale = signal(false);
  protected readonly note = new FormControl('', { nonNullable: true });

  constructor() {
    const titles = inject(PageTitles);
    effect(() => {
      const run = this.run();
      if (!run) return;
      titles.set(`Run on ${dayLabel(run.date, 'medium')}`);
      this.note.setValue(run.note);
    });
  }

  protected can(action: RunAction): boolean {
    return this.actions().includes(action);
  }

  protected async wish(run: Run, parcel: RunParcel, wish: ParcelWish): Promise<void> {
    if (wish === 'take-off')
      return this.ask({
        run,
        patch: { removeParcelIds: [parcel.id] },
        title: `Take ${parcel.code} off this run?`,
      });
    const patch = { pin: [{ parcelId: parcel.id, pinned: wish === 'pin' }] };
    await this.make(this.api.change(run, patch));
  }

  protected add(run: Run, parcel: Parcel): Promise<void> {
    const patch: RunPatch = { addParcelIds: [parcel.id] };
    return this.ask({ run, patch, title: `Put ${parcel.code} on this run?` });
  }

  protected move(run: Run, { id, code }: RunParcel, target: Run): Promise<void> {
    return this.ask({
      run: target,
      patch: { addParcelIds: [id] },
      title: `Move ${code} to ${target.coordinator.name} on ${dayLabel(target.date, 'medium')}?`,
      from: { run, parcelId: id },
    });
  }

  protected async confirm(run: Run): Promise<void> {
    const question = {
      title: 'Confirm this run?',
      text: toldOnConfirmation(run),
      yes: 'Confirm and tell everybody',
      no: 'Not yet',
    };
    if (await confirmed(this.dialog, question)) await this.make(this.api.confirm(run));
  }

  protected async depart(run: Run): Promise<void> {
    const ids = await this.open<number[]>(AboardDialog, run);
    if (ids) await this.make(this.api.depart(run, ids));
  }

  protected async handOver(run: Run): Promise<void> {
    const tracking = await this.open<TrackingEntry[]>(HandOverDialog, run);
    if (tracking) await this.make(this.api.handOver(run, tracking));
  }

  protected async callOff(run: Run): Promise<void> {
    const reason = await this.open<string>(CallOffDialog, run);
    if (reason) await this.make(this.api.callOff(run, reason));
  }

  protected saveNote(run: Run): Promise<void> {
    return this.make(this.api.change(run, { note: this.note.value }));
  }

  protected reload(): void {
    this.isStale.set(false);
    this.changing.say(null);
    this.loading.reload();
  }

  protected print(): void {
    this.document.defaultView?.print();
  }

  private ofRun<T>(make: (run: Run) => T, without: T): T {
    const run = this.run();
    return run ? make(run) : without;
  }

  private async ask(change: RunChange): Promise<void> {
    const saved = await this.open<Run>(RunChangeDialog, change);
    if (!saved) return;
    // After a move the answer is the other run; this one is read again.
    if (change.from) this.reload();
    else this.show(saved);
  }

  private around(): Observable<Around> {
    const today = dateIn(this.session.circleZone(), new Date());
    return forkJoin({
      parcels: this.api.waitingParcels(),
      runs: this.api.list(today, addDays(today, daysAhead)),
    });
  }

  private targetsOf(run: Run): Map<number, Run[]> {
    const { parcels, runs } = this.known();
    const today = dateIn(run.zone, new Date());
    const own = new Set(run.parcels.map((parcel) => parcel.id));
    return new Map(
      parcels
        .filter((parcel) => own.has(parcel.id))
        .map((parcel) => [parcel.id, runsFor(parcel, runs, today)]),
    );
  }

  private open<R>(component: Type<unknown>, data: unknown): Promise<R | undefined> {
    return firstValueFrom(
      this.dialog.open<unknown, unknown, R>(component, { data, width: '480px' }).afterClosed(),
    );
  }

  private async make(call: Observable<Run>): Promise<void> {
    const saved = await this.changing.run(call, (problem) => {
      this.isStale.set(problem.code === 'stale');
      return problem.code === 'stale'
        ? 'Somebody changed this run meanwhile.'
        : problemText({ ...problem, errors: [] });
    });
    if (saved) this.show(saved);
  }

  private show(run: Run): void {
    this.isStale.set(false);
    this.loading.set(run);
  }
}

function placesOf(run: Run): MapPlace[] {
  return [
    { kind: 'start', name: 'start', lat: run.coordinator.lat, lon: run.coordinator.lon },
    ...run.stops.map((stop) => ({
      kind: 'stop' as const,
      name: stop.city ?? stop.breederName,
      lat: stop.lat,
      lon: stop.lon,
    })),
    { kind: 'counter', name: run.counter.name, lat: run.counter.lat, lon: run.counter.lon },
  ];
}
