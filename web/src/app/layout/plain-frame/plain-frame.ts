import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { BrandMark } from '../../ui/brand-mark/brand-mark';
import { FirstLight } from './first-light';

/** The frame of pages without navigation (sign-in and its kin): a picture beside one short column. */
@Component({
  selector: 'db-plain-frame',
  imports: [BrandMark, FirstLight, RouterLink],
  template: `
    <db-first-light class="picture" />
    <main>
      <div class="column" [class.wide]="wide()">
        <a class="name" routerLink="/"><db-brand-mark />Dayberth</a>
        <h1 tabindex="-1">{{ heading() }}</h1>
        @if (sub()) {
          <p class="sub">{{ sub() }}</p>
        }
        <ng-content />
      </div>
    </main>
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: minmax(280px, 5fr) 7fr;
      min-height: 100dvh;
    }
    .picture {
      position: sticky;
      top: 0;
      height: 100dvh;
    }
    main {
      display: grid;
      align-content: center;
      padding: 40px 32px;
    }
    .column {
      width: 100%;
      max-width: 420px;
      margin: 0 auto;
      &.wide {
        max-width: 640px;
      }
    }
    .name {
      display: inline-flex;
      gap: 10px;
      align-items: center;
      margin-bottom: 28px;
      font-weight: 600;
      font-size: 19px;
      color: var(--db-ink);
      text-decoration: none;
    }
    .sub {
      color: var(--db-ink-2);
      margin: 6px 0 22px;
    }
    @media (max-width: 760px) {
      :host {
        display: block;
      }
      .picture {
        position: static;
        height: 132px;
      }
      main {
        padding: 22px 18px 48px;
      }
      .name {
        margin-bottom: 18px;
      }
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlainFrame {
  readonly heading = input.required<string>();
  readonly sub = input('');
  readonly wide = input(false);
}
