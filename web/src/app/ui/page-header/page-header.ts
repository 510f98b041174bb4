import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';

/**
 * The head of a page: a way back, the one h1 (which takes the focus after a navigation), a line below it, and room
 * for chips (`[chips]`) and actions (`[actions]`).
 */
@Component({
  selector: 'db-page-header',
  imports: [RouterLink],
  template: `
    @if (back(); as link) {
      <a class="back" [routerLink]="link">{{ backText() }}</a>
    }
    <div class="line">
      <div class="words">
        <h1 tabindex="-1">{{ heading() }}</h1>
        @if (sub()) {
          <p class="sub">{{ sub() }}</p>
        }
        <ng-content select="[chips]" />
      </div>
      <div class="actions"><ng-content select="[actions]" /></div>
    </div>
  `,
  styles: `
    :host {
      display: block;
      margin-bottom: 22px;
    }
    .back {
      display: inline-block;
      color: var(--db-ink-2);
      font-size: 13.5px;
      padding: 4px 0;
      min-height: 24px;
      text-underline-offset: 3px;
    }
    .line {
      display: flex;
      flex-wrap: wrap;
      gap: 12px 28px;
      align-items: flex-end;
      justify-content: space-between;
    }
    .words {
      flex: 1 1 320px;
      min-width: 0;
    }
    h1 {
      overflow-wrap: anywhere;
    }
    .sub {
      color: var(--db-ink-2);
      margin: 4px 0 0;
      max-width: 70ch;
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      gap: 10px;
      align-items: center;
    }
    .actions:empty {
      display: none;
    }
    @media (max-width: 760px) {
      :host {
        margin-bottom: 16px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PageHeader {
  readonly heading = input.required<string>();
  readonly sub = input<string | null>();
  readonly back = input<string>();
  readonly backText = input('Back');
}
