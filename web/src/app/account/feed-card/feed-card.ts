import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { CallState, errorText } from '../../ui/call-state';
import { confirmed } from '../../ui/confirm-dialog/confirm-dialog';
import { CopyButton } from '../../ui/copy-button/copy-button';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { AccountApi } from '../account-api';

/** The secret address at which one's own calendar program finds runs and arrivals. */
@Component({
  selector: 'db-feed-card',
  imports: [CopyButton, MatButton, ProblemNote],
  template: `<h2>Your calendar</h2>
    <p class="db-hint">
      Subscribe to this address in your calendar program, and your runs and arrivals appear there by
      themselves. Whoever has it can read them: keep it to yourself.
    </p>
    <db-problem-note [message]="problem()" retry="Try again" (again)="feed.reload()" />
    @if (url(); as text) {
      <p class="address">{{ text }}</p>
      <db-problem-note [message]="renewing.message()" />
      <div class="db-row">
        <db-copy-button [text]="text" label="Copy the address" />
        <button matButton type="button" [disabled]="renewing.busy()" (click)="renew()">
          Make a new address
        </button>
      </div>
    }`,
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FeedCard {
  private readonly api = inject(AccountApi);
  private readonly dialog = inject(MatDialog);

  protected readonly feed = rxResource({ stream: () => this.api.feed() });
  protected readonly url = computed(() => (this.feed.hasValue() ? this.feed.value().url : null));
  protected readonly problem = computed(() => errorText(this.feed.error()));
  protected readonly renewing = new CallState();

  protected async renew(): Promise<void> {
    const isSure = await confirmed(this.dialog, {
      title: 'Make a new address?',
      text: 'The present one ends at once: calendars that are subscribed to it will not be told anything any more.',
      yes: 'Make a new one',
      no: 'Keep it',
    });
    if (!isSure) return;
    const fresh = await this.renewing.run(this.api.newFeed());
    if (fresh) this.feed.set(fresh);
  }
}
