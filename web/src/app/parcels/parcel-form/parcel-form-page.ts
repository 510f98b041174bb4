import {
  ChangeDetectionStrategy,
  Component,
  computed,
  ElementRef,
  inject,
  input,
  signal,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatRadioModule } from '@angular/material/radio';
import { MatOption, MatSelect } from '@angular/material/select';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { catchError, debounceTime, filter, forkJoin, map, of, startWith, switchMap } from 'rxjs';
import type { BreederSummary, Parcel, PostalCodeInfo, Problem } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { applyProblem } from '../../core/http/problem';
import { answersFromQuery } from '../../core/route-answers';
import { SessionStore } from '../../core/session/session-store';
import { UnitPreference } from '../../core/unit-preference';
import { CallState, errorText } from '../../ui/call-state';
import { CircleLists } from '../../ui/circle-lists';
import { ContentsRows } from '../../ui/contents-rows/contents-rows';
import { focusFirstError } from '../../ui/focus-first-error';
import { HoldCounterField } from '../../ui/hold-counter-field/hold-counter-field';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { dateIn } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import type { HasUnsavedChanges } from '../../ui/unsaved-guard';
import { ParcelsApi } from '../parcels-api';
import {
  fillFrom,
  fillNew,
  followService,
  isNoteOnly,
  newBody,
  parcelForm,
  patchBody,
} from './parcel-form-model';

/** A new parcel, or an edit of one when the address names it. */
@Component({
  selector: 'db-parcel-form-page',
  imports: [
    ContentsRows,
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
    ProblemNote,
    ReactiveFormsModule,
    RouterLink,
  ],
  providers: [CircleLists],
  host: { '(window:beforeunload)': 'warnOfLoss($event)' },
  templateUrl: './parcel-form-page.html',
  styleUrl: './parcel-form-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelFormPage implements HasUnsavedChanges {
  private readonly api = inject(ParcelsApi);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly query = inject(ActivatedRoute).snapshot.queryParamMap;
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  protected readonly lists = inject(CircleLists);
  protected readonly unit = inject(UnitPreference).unit;

  /** The parcel's id in the address; none for a new one. */
  readonly id = input<string>();

  protected readonly form = parcelForm();
  protected readonly saving = new CallState();
  protected readonly isStale = signal(false);
  protected readonly forOthers = computed(() => this.session.has('coordinator', 'admin'));
  protected readonly start = rxResource({
    params: () => ({ id: this.id() }),
    stream: ({ params }) =>
      forkJoin({
        parcel: params.id === undefined ? of(null) : this.api.get(Number(params.id)),
        breeders:
          this.forOthers() && params.id === undefined ? this.api.breeders() : of<BreederSummary[]>([]),
        me: this.api.me(),
      }),
  });
  protected readonly problem = computed(() => errorText(this.start.error()) ?? this.lists.problem());
  protected readonly parcel = computed(() => (this.start.hasValue() ? this.start.value().parcel : null));
  protected readonly breeders = computed(() => (this.start.hasValue() ? this.start.value().breeders : []));
  protected readonly isReady = computed(() => this.start.hasValue() && this.lists.isReady());
  /** What the form is filled from: again after each loading. */
  private readonly loaded = computed(() =>
    this.isReady() && this.start.hasValue() ? this.start.value() : null,
  );
  protected readonly noteOnly = computed(() => {
    const parcel = this.parcel();
    return parcel !== null && isNoteOnly(parcel);
  });
  protected readonly heading = computed(() => {
    const parcel = this.parcel();
    if (!parcel) return this.id() === undefined ? 'New parcel' : 'Change a parcel';
    return this.noteOnly() ? `Note on ${parcel.code}` : `Change ${parcel.code}`;
  });
  protected readonly backLink = computed(() =>
    this.id() === undefined ? '/parcels' : `/parcels/${this.id()}`,
  );
  protected readonly service = toSignal(
    this.form.controls.service.valueChanges.pipe(
      startWith(null),
      map(() => this.form.controls.service.value),
    ),
    { requireSync: true },
  );
  private isSaved = false;

  constructor() {
    toObservable(this.loaded)
      .pipe(
        filter((loaded) => loaded !== null),
        takeUntilDestroyed(),
      )
      .subscribe(() => this.fill());
    const { service, readyFrom, latestDate, breederId, door } = this.form.controls;
    service.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => followService(this.form));
    readyFrom.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => latestDate.updateValueAndValidity());
    breederId.valueChanges.pipe(takeUntilDestroyed()).subscribe((id) => this.takeCounterOf(id));
    door.controls.postalCode.valueChanges
      .pipe(
        debounceTime(200),
        filter((zip) => /^\d{5}$/.test(zip)),
        switchMap((zip) => this.lists.lookUp(zip).pipe(catchError(() => of(null)))),
        takeUntilDestroyed(),
      )
      .subscribe((found) => found && this.takePlace(found));
  }

  hasUnsavedChanges(): boolean {
    return this.form.dirty && !this.isSaved;
  }

  protected warnOfLoss(event: BeforeUnloadEvent): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.saving.busy()) return;
    if (this.form.invalid) {
      this.saving.say('Some fields need another look.');
      focusFirstError(this.host.nativeElement);
      return;
    }
    const before = this.parcel();
    const call = before
      ? this.api.change(before, patchBody(this.form, this.noteOnly()))
      : this.api.create(newBody(this.form));
    const saved = await this.saving.run<Parcel>(call, (problem) => this.explain(problem));
    if (!saved) return;
    this.isSaved = true;
    const queryParams = before === null ? { day: this.query.get('day') } : {};
    await this.router.navigate(['/parcels', saved.id], { queryParams, replaceUrl: before === null });
  }

  /** Takes what somebody else saved meanwhile; what was typed here is let go, as the button says. */
  protected reload(): void {
    this.isStale.set(false);
    this.saving.say(null);
    this.form.markAsPristine();
    this.start.reload();
  }

  private fill(): void {
    const parcel = this.parcel();
    if (parcel) fillFrom(this.form, parcel);
    else this.fillFresh();
    if (this.noteOnly())
      Object.entries(this.form.controls).forEach(
        ([name, control]) => name === 'note' || control.disable({ emitEvent: false }),
      );
    this.form.markAsPristine();
    this.form.markAsUntouched();
  }

  private fillFresh(): void {
    const answers = answersFromQuery((key) => this.query.get(key));
    fillNew(this.form, answers, dateIn(this.session.circleZone(), new Date()));
    const { boxId, dropOffCounterId, breederId } = this.form.controls;
    if (boxId.value === null) boxId.setValue(this.lists.boxes()[0]?.id ?? null);
    const me = this.start.hasValue() ? this.start.value().me : null;
    if (dropOffCounterId.value === null) dropOffCounterId.setValue(me?.breeder?.dropOffCounterId ?? null);
    if (!this.forOthers()) return;
    breederId.addValidators(Validators.required);
    if (me && this.breeders().some((one) => one.id === me.id)) breederId.setValue(me.id);
  }

  private takeCounterOf(breederId: number | null): void {
    const { dropOffCounterId } = this.form.controls;
    const breeder = this.breeders().find((one) => one.id === breederId);
    if (breeder && !dropOffCounterId.dirty) dropOffCounterId.setValue(breeder.dropOffCounterId);
  }

  private takePlace(found: PostalCodeInfo): void {
    const { city, state } = this.form.controls.door.controls;
    if (!city.dirty) city.setValue(found.city);
    if (!state.dirty) state.setValue(found.state);
  }

  private explain(problem: Problem): string {
    this.isStale.set(problem.code === 'stale');
    if (problem.code === 'stale')
      return 'Somebody changed this parcel meanwhile. Load it as it is now, then change it again.';
    const text = applyProblem(this.form, problem);
    focusFirstError(this.host.nativeElement);
    return text;
  }
}
