import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import type { PolicyAnswer } from '@shared/contract';
import { SessionStore } from '../../core/session/session-store';
import { UnitPreference } from '../../core/unit-preference';
import { errorText } from '../../ui/call-state';
import { PageHeader } from '../../ui/page-header/page-header';
import { PolicyTable } from '../../ui/policy-table/policy-table';
import { policySections } from '../../ui/policy-table/policy-values';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { howNumbers, legWords } from '../how-numbers';

/** How a day verdict comes about: each step in words and formulas, with the values in force, and what it cannot do. */
@Component({
  selector: 'db-how-page',
  imports: [MatProgressBar, PageHeader, PolicyTable, ProblemNote, RouterLink],
  templateUrl: './how-page.html',
  styleUrl: './how-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HowPage {
  private readonly unit = inject(UnitPreference).unit;
  private readonly session = inject(SessionStore);

  protected readonly loaded = httpResource<PolicyAnswer>(() => '/api/policy');
  protected readonly problem = computed(() => errorText(this.loaded.error()));
  private readonly answer = computed(() => (this.loaded.hasValue() ? this.loaded.value() : null));
  protected readonly values = computed(() => this.answer()?.values ?? null);
  protected readonly canOpenPolicy = computed(() => this.session.has('admin', 'coordinator', 'breeder'));
  protected readonly versionWords = computed(() => {
    const version = this.answer()?.version;
    return version ? `version ${version} of the policy` : 'the defaults';
  });
  protected readonly numbers = computed(() => {
    const values = this.values();
    return values && howNumbers(values, this.unit());
  });
  protected readonly legs = computed(() => {
    const values = this.values();
    return values ? legWords(values, this.unit()) : [];
  });
  protected readonly sections = computed(() => {
    const answer = this.answer();
    return answer ? policySections(answer.values, answer.defaults, this.unit()) : [];
  });
}
