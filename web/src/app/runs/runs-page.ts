import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { SessionStore } from '../core/session/session-store';
import { MyRuns } from './my-runs/my-runs';
import { RunBoard } from './run-board/run-board';

/** The runs: the board for who drives or runs the circle, one's own collections for a breeder. */
@Component({
  selector: 'db-runs-page',
  imports: [MyRuns, RunBoard],
  template: `@if (plans()) {
      <db-run-board />
    } @else {
      <db-my-runs />
    }`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunsPage {
  private readonly session = inject(SessionStore);
  protected readonly plans = computed(() => this.session.has('coordinator', 'admin'));
}
