import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import { rxResource, takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatOption, MatSelect } from '@angular/material/select';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { debounceTime, merge } from 'rxjs';
import type { ParcelState } from '@shared/contract';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { dateIn } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { parcelWords } from '../../ui/state-chip/state-words';
import { groupByNeed, pressingText } from '../next-need';
import { ParcelRow } from '../parcel-row/parcel-row';
import { ParcelsApi } from '../parcels-api';

/** The parcels by the next thing each one needs: a breeder's own, or everybody's for coordinators and admins. */
@Component({
  selector: 'db-parcel-list',
  imports: [
    EmptyState,
    MatButton,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    MatOption,
    MatProgressBar,
    MatSelect,
    NextAction,
    PageHeader,
    ParcelRow,
    ProblemNote,
    ReactiveFormsModule,
    RouterLink,
  ],
  templateUrl: './parcel-list.html',
  styleUrl: './parcel-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ParcelList {
  private readonly api = inject(ParcelsApi);
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);

  /** The search and the states, from the address, so that going back finds the same list. */
  readonly q = input<string>();
  readonly state = input<string>();

  protected readonly stateWords = Object.entries(parcelWords).map(([state, { word }]) => ({
    state: state as ParcelState,
    word,
  }));
  protected readonly search = new FormControl('', { nonNullable: true });
  protected readonly states = new FormControl<string[]>([], { nonNullable: true });
  protected readonly seesAll = computed(() => this.session.has('coordinator', 'admin'));
  protected readonly isFiltered = computed(() => Boolean(this.q() || this.state()));
  protected readonly found = rxResource({
    params: () => ({ q: this.q() ?? '', state: this.state() ?? '' }),
    stream: ({ params }) => this.api.list(params),
  });
  protected readonly problem = computed(() => errorText(this.found.error()));
  protected readonly groups = computed(() =>
    groupByNeed(this.found.hasValue() ? this.found.value() : [], (zone) => dateIn(zone, new Date())),
  );
  protected readonly summary = computed(() => (this.found.hasValue() ? pressingText(this.groups()) : null));

  constructor() {
    toObservable(this.q)
      .pipe(takeUntilDestroyed())
      .subscribe(
        (q) => this.search.value === (q ?? '') || this.search.setValue(q ?? '', { emitEvent: false }),
      );
    toObservable(this.state)
      .pipe(takeUntilDestroyed())
      .subscribe((state) => this.states.setValue(state ? state.split(',') : [], { emitEvent: false }));
    merge(this.search.valueChanges.pipe(debounceTime(250)), this.states.valueChanges)
      .pipe(takeUntilDestroyed())
      .subscribe(() => this.filter(this.search.value.trim(), this.states.value));
  }

  protected showAll(): void {
    this.filter('', []);
  }

  private filter(q: string, states: readonly string[]): void {
    const queryParams = { q: q || null, state: states.length > 0 ? states.join(',') : null };
    void this.router.navigate([], { relativeTo: this.route, queryParams, replaceUrl: true });
  }
}
