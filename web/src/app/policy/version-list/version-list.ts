import { ChangeDetectionStrategy, Component, computed, inject, input } from '@angular/core';
import type { PolicyVersionSummary } from '@shared/contract';
import { dayAndClock } from '../../core/dates';
import { SessionStore } from '../../core/session/session-store';
import { changesText, makerText } from '../version-words';

/** Every version of the policy, the newest first: who saved it, when, and what it changed. */
@Component({
  selector: 'db-version-list',
  template: `<ol>
    @for (one of rows(); track one.version) {
      <li>
        <b>{{ one.version === 0 ? 'Defaults' : 'Version ' + one.version }}</b>
        @if ($first) {
          <span> · in force</span>
        }
        <br /><span class="quiet">{{ one.made }}</span> <br />{{ one.changes }}
      </li>
    }
  </ol>`,
  styles: `
    ol {
      list-style: none;
      margin: 0;
      padding: 0;
    }
    li {
      border-top: 1px solid var(--db-line);
      padding: 10px 0;
      overflow-wrap: anywhere;
    }
    .quiet {
      color: var(--db-ink-2);
      font-size: 13.5px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VersionList {
  private readonly session = inject(SessionStore);
  readonly versions = input.required<readonly PolicyVersionSummary[]>();
  protected readonly rows = computed(() =>
    this.versions().map((one) => ({
      version: one.version,
      made: [one.since === null ? '' : dayAndClock(one.since, this.session.circleZone()), makerText(one)]
        .filter((part) => part !== '')
        .join(', '),
      changes: changesText(one),
    })),
  );
}
