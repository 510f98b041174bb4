import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import type { Verdict } from '@shared/contract';
import { VerdictGlyph } from '../verdict-glyph/verdict-glyph';

/** A verdict with its glyph and word. */
@Component({
  selector: 'db-verdict-chip',
  imports: [VerdictGlyph],
  template: `<db-verdict-glyph [verdict]="verdict()" />{{ verdict() }}`,
  host: { '[attr.data-verdict]': 'verdict()' },
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 7px;
      font-weight: 600;
      font-size: 14px;
      line-height: 1.4;
      padding: 3px 12px 3px 8px;
      border-radius: 99px;
      background: var(--db-slate-soft);
      color: var(--db-slate);
    }
    :host([data-verdict='open']) {
      background: var(--db-juniper-soft);
      color: var(--db-juniper);
    }
    :host([data-verdict='tight']) {
      background: var(--db-ochre-soft);
      color: var(--db-ochre);
    }
    :host([data-verdict='far']) {
      background: none;
      color: var(--db-ink-2);
      box-shadow: inset 0 0 0 1px var(--db-outline);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class VerdictChip {
  readonly verdict = input.required<Verdict>();
}
