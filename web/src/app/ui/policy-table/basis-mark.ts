import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { MatIcon } from '@angular/material/icon';
import type { PolicyNote } from '@shared/policy/policy-notes';

/** Whether a value was read somewhere or is an assumption, in a word and a sign, with where or why. */
@Component({
  selector: 'db-basis-mark',
  imports: [MatIcon],
  template: `<b class="mark" [attr.data-sourced]="isSourced()"
      ><mat-icon [svgIcon]="isSourced() ? 'check' : 'edit'" aria-hidden="true" />{{
        isSourced() ? 'Sourced' : 'Assumption'
      }}</b
    >
    <span>{{ note().source ?? note().remark }}</span>`,
  styles: `
    :host {
      display: block;
      font-size: 13.5px;
      color: var(--db-ink-2);
      overflow-wrap: anywhere;
    }
    .mark {
      font-weight: 500;
      color: var(--db-ochre);
      white-space: nowrap;
      margin-right: 4px;
    }
    .mark[data-sourced='true'] {
      color: var(--db-juniper);
    }
    mat-icon {
      width: 15px;
      height: 15px;
      vertical-align: -2px;
      margin-right: 4px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BasisMark {
  readonly note = input.required<PolicyNote>();
  protected readonly isSourced = computed(() => this.note().source !== null);
}
