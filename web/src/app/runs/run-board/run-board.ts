import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { MatProgressBar } from '@angular/material/progress-bar';
import { RouterLink } from '@angular/router';
import { firstValueFrom, forkJoin } from 'rxjs';
import type { Parcel, Proposal, Run } from '@shared/contract';
import { dayLabel } from '../../core/dates';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { SessionStore } from '../../core/session/session-store';
import { CallState, errorText } from '../../ui/call-state';
import { EmptyState } from '../../ui/empty-state/empty-state';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { addDays, dateIn, startOfWeek } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { boardColumns, boardSummary, boardWeeks } from '../board-layout';
import { RunCard } from '../run-card/run-card';
import { RunChangeDialog, type RunChange } from '../run-change-dialog/run-change-dialog';
import { boundText, planFigures, proposalFigures } from '../run-figures';
import { RunsApi } from '../runs-api';
import { unplacedItems } from '../unplaced-items';
import { UnplacedList } from '../unplaced-list/unplaced-list';

const weeksShown = 3;

/** The coordinator's board: days across, runs in them, what is not placed at the side. */
@Component({
  selector: 'db-run-board',
  imports: [
    DayLabelPipe,
    EmptyState,
    MatButton,
    MatIcon,
    MatProgressBar,
    NextAction,
    PageHeader,
    ProblemNote,
    RouterLink,
    RunCard,
    UnplacedList,
  ],
  templateUrl: './run-board.html',
  styleUrl: './run-board.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunBoard {
  private readonly api = inject(RunsApi);
  private readonly session = inject(SessionStore);
  private readonly dialog = inject(MatDialog);

  protected readonly today = dateIn(this.session.circleZone(), new Date());
  protected readonly offset = signal(0);
  protected readonly proposal = signal<Proposal | null>(null);
  protected readonly proposing = new CallState();
  private readonly start = computed(() => addDays(startOfWeek(this.today), this.offset() * weeksShown * 7));
  protected readonly board = rxResource({
    params: () => ({ from: this.start(), to: addDays(this.start(), weeksShown * 7 - 1) }),
    stream: ({ params }) =>
      forkJoin({ runs: this.api.list(params.from, params.to), waiting: this.api.waitingParcels() }),
  });
  protected readonly problem = computed(() => errorText(this.board.error()));
  protected readonly known = computed(() =>
    this.board.hasValue() ? this.board.value() : { runs: [], waiting: [] },
  );
  protected readonly weeks = computed(() =>
    boardWeeks(this.known().runs, this.known().waiting, this.today, {
      start: this.start(),
      count: weeksShown,
    }).map((week) => ({
      ...week,
      columns: boardColumns(week),
    })),
  );
  protected readonly hasRuns = computed(() =>
    this.weeks().some((week) => week.days.some((day) => day.runs.length > 0)),
  );
  protected readonly summary = computed(() =>
    boardSummary(this.weeks(), (date) => dayLabel(date, 'weekday')),
  );
  protected readonly unplaced = computed(() =>
    unplacedItems(this.known().waiting, this.proposal()?.unplaced ?? []),
  );
  protected readonly figures = computed(() => {
    const proposal = this.proposal();
    if (proposal) return proposalFigures(proposal);
    return planFigures(
      this.weeks().flatMap((week) => week.days.flatMap((day) => day.runs)),
      this.unplaced().length,
    );
  });

  protected readonly bound = computed(() => {
    const proposal = this.proposal();
    return proposal && proposal.runs.length > 0 ? boundText(proposal) : '';
  });

  protected async putOn(parcel: Parcel, run: Run): Promise<void> {
    const data: RunChange = {
      run,
      patch: { addParcelIds: [parcel.id] },
      title: `Put ${parcel.code} on the run on ${dayLabel(run.date, 'medium')}?`,
    };
    const dialog = this.dialog.open<RunChangeDialog, RunChange, Run>(RunChangeDialog, {
      data,
      width: '480px',
    });
    if (await firstValueFrom(dialog.afterClosed())) this.board.reload();
  }

  protected async proposeRuns(): Promise<void> {
    const proposal = await this.proposing.run(this.api.propose());
    if (!proposal) return;
    this.proposal.set(proposal);
    this.board.reload();
  }
}
