import { ChangeDetectionStrategy, Component } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { EmptyState } from '../../ui/empty-state/empty-state';

@Component({
  selector: 'db-not-found',
  imports: [EmptyState, MatButton, RouterLink],
  template: `<main>
    <h1 class="db-sr">Not found</h1>
    <db-empty-state
      picture="road"
      heading="No page at this address"
      text="It may have moved, or the link lost a piece on the way."
    >
      <a matButton="filled" class="db-go" routerLink="/">To the first page</a>
    </db-empty-state>
  </main>`,
  styles: `
    main {
      padding: 12vh 16px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class NotFound {}
