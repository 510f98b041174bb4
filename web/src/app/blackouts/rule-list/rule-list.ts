import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import { RouterLink } from '@angular/router';
import type { Blackout } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { ruleGroups, scopeIcons, scopeText, whenText } from '../blackout-words';
import type { ScopeNames } from '../blackouts-api';

/** The blackouts as a list: for whom, when, the next day, what is lifted. */
@Component({
  selector: 'db-rule-list',
  imports: [DayLabelPipe, MatIcon, RouterLink],
  template: `
    @for (group of groups(); track group.title) {
      <h3>{{ group.title }}</h3>
      <ul>
        @for (row of group.rows; track row.blackout.id) {
          <li>
            <mat-icon [svgIcon]="icons[row.blackout.scope]" aria-hidden="true" />
            <div class="words">
              @if (canEdit()) {
                <a [routerLink]="['/blackouts', row.blackout.id]">{{ row.blackout.title }}</a>
              } @else {
                <b>{{ row.blackout.title }}</b>
              }
              <span>{{ when(row.blackout) }}, {{ scope(row.blackout) }}</span>
              @if (row.next && row.blackout.kind === 'yearly') {
                <span>Next: {{ row.next | dayLabel: 'medium' }}</span>
              }
              @if (lifted(row.blackout); as days) {
                <span class="lifted">Lifted: {{ days }}</span>
              }
              @if (row.blackout.note && row.blackout.source === 'admin') {
                <span class="note">{{ row.blackout.note }}</span>
              }
            </div>
          </li>
        }
      </ul>
    }
  `,
  styles: `
    h3 {
      font-size: 14px;
      color: var(--db-ink-2);
      margin: 18px 0 2px;
    }
    h3:first-child {
      margin-top: 0;
    }
    ul {
      list-style: none;
      margin: 0;
      padding: 0;
    }
    li {
      display: flex;
      gap: 10px;
      padding: 10px 0;
      border-bottom: 1px solid var(--db-line);
    }
    li:last-child {
      border-bottom: 0;
    }
    mat-icon {
      flex: none;
      width: 19px;
      height: 19px;
      margin-top: 2px;
      color: var(--db-ink-2);
    }
    .words {
      display: flex;
      flex-direction: column;
      min-width: 0;
      font-size: 14px;
    }
    .words > span {
      color: var(--db-ink-2);
    }
    a,
    b {
      font-weight: 600;
      font-size: 15px;
    }
    a {
      min-height: 24px;
    }
    .note {
      overflow-wrap: anywhere;
    }
    .words > .lifted {
      color: var(--db-ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RuleList {
  readonly blackouts = input.required<readonly Blackout[]>();
  readonly names = input.required<ScopeNames>();
  readonly today = input.required<string>();
  readonly canEdit = input(false);

  protected readonly icons = scopeIcons;
  protected readonly when = whenText;
  protected readonly groups = computed(() => ruleGroups(this.blackouts(), this.today()));

  protected scope(blackout: Blackout): string {
    return scopeText(blackout, this.names());
  }

  protected lifted(blackout: Blackout): string {
    return blackout.liftedDates
      .filter((date) => date >= this.today())
      .map((date) => dayLabel(date, 'medium'))
      .join('; ');
  }
}
