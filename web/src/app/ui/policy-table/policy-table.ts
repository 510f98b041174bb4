import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { BasisMark } from './basis-mark';
import { withUnit, type PolicySection } from './policy-values';

/** One group of the policy to read: each value with its unit, its default where it differs, and what it rests on. */
@Component({
  selector: 'db-policy-table',
  imports: [BasisMark],
  template: `<table class="db-table">
    <caption class="db-sr">
      {{
        section().title
      }}
    </caption>
    <thead>
      <tr>
        <th scope="col">What</th>
        <th scope="col">Value</th>
        <th scope="col">Rests on</th>
      </tr>
    </thead>
    <tbody>
      @for (row of rows(); track row.path) {
        <tr>
          <th scope="row">{{ row.note.label }}</th>
          <td>
            <b>{{ row.shown }}</b>
            @if (row.original; as original) {
              <br /><span class="original">changed; default {{ original }}</span>
            }
          </td>
          <td><db-basis-mark [note]="row.note" /></td>
        </tr>
      }
    </tbody>
  </table>`,
  styles: `
    th[scope='row'] {
      font-weight: 400;
      width: 32%;
    }
    td:nth-child(2) {
      width: 26%;
    }
    b {
      font-weight: 600;
    }
    .original {
      color: var(--db-ink-2);
      font-size: 13.5px;
    }
    @media (max-width: 760px) {
      thead {
        display: none;
      }
      tr {
        display: block;
        padding: 8px 0;
        border-top: 1px solid var(--db-line);
      }
      table.db-table :is(th[scope='row'], td) {
        display: block;
        width: auto;
        border: 0;
        padding: 1px 0;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PolicyTable {
  readonly section = input.required<PolicySection>();
  protected readonly rows = computed(() =>
    this.section().rows.map((row) => ({
      ...row,
      shown: withUnit(row.text, row.unitWord),
      original: row.text === row.defaultText ? null : withUnit(row.defaultText, row.unitWord),
    })),
  );
}
