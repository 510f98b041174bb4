import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatOption, MatSelect } from '@angular/material/select';
import { RouterLink } from '@angular/router';
import type { Carrier, Counter } from '@shared/contract';
import { minuteText } from '../../core/dates';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { stateName } from '../../ui/us-states';
import { zoneName } from '../../ui/us-zones';
import { cutOffText, foundCounters, hoursText, workText, type CounterSearch } from '../counter-words';

/** All counters: where they are, what they do and when. An admin opens one to change it. */
@Component({
  selector: 'db-counter-list',
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
    ProblemNote,
    RouterLink,
  ],
  templateUrl: './counter-list.html',
  styleUrl: './counter-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class CounterList {
  private readonly session = inject(SessionStore);

  protected readonly canEdit = computed(() => this.session.has('admin'));
  protected readonly listed = httpResource<Counter[]>(() => '/api/counters');
  private readonly carriers = httpResource<Carrier[]>(() => '/api/carriers');
  protected readonly problem = computed(() => errorText(this.listed.error()));
  protected readonly all = computed(() => (this.listed.hasValue() ? this.listed.value() : null));
  protected readonly search = signal<CounterSearch>({ text: '', state: '', does: 'all' });
  protected readonly states = computed(() =>
    [...new Set(this.all()?.map(({ state }) => state))]
      .map((code) => ({ code, name: stateName(code) }))
      .toSorted((a, b) => a.name.localeCompare(b.name)),
  );
  protected readonly cards = computed(() =>
    foundCounters(this.all() ?? [], this.search()).map((counter) => ({
      counter,
      cutOff: counter.canDropOff ? cutOffText(counter) : '',
      hours: hoursText(counter),
      works: workText(counter),
      ready: minuteText(counter.commitMinute),
      zone: zoneName(counter.zone),
      carrier: this.carrierName(counter.carrierId),
    })),
  );

  protected look(change: Partial<CounterSearch>): void {
    this.search.update((search) => ({ ...search, ...change }));
  }

  private carrierName(id: number): string {
    const carriers = this.carriers.hasValue() ? this.carriers.value() : [];
    return carriers.find((carrier) => carrier.id === id)?.name ?? '';
  }
}
