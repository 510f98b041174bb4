import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatOption, MatSelect } from '@angular/material/select';
import { RouterLink } from '@angular/router';
import type { Person } from '@shared/contract';
import { errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { foundPeople, personState, stateWords, type PeopleSearch } from '../people-words';

/** Everybody in the circle: what they do, and whether they can come in. */
@Component({
  selector: 'db-people-list',
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
  templateUrl: './people-list.html',
  styleUrl: './people-list.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PeopleList {
  protected readonly listed = httpResource<Person[]>(() => '/api/people');
  protected readonly problem = computed(() => errorText(this.listed.error()));
  protected readonly all = computed(() => (this.listed.hasValue() ? this.listed.value() : null));
  protected readonly search = signal<PeopleSearch>({ text: '', role: '', state: '' });
  protected readonly roles = ['breeder', 'coordinator', 'buyer', 'admin'] as const;
  protected readonly states = Object.entries(stateWords);
  protected readonly rows = computed(() =>
    foundPeople(this.all() ?? [], this.search()).map((person) => {
      const state = personState(person);
      return {
        person,
        state,
        words: stateWords[state],
        place: [person.city, person.state].filter(Boolean).join(', '),
      };
    }),
  );

  protected look(change: Partial<PeopleSearch>): void {
    this.search.update((search) => ({ ...search, ...change }));
  }
}
