import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { MatProgressBar } from '@angular/material/progress-bar';
import { forkJoin, of } from 'rxjs';
import type { Run, RunPatch } from '@shared/contract';
import { clock } from '../../core/dates';
import { CallState, errorText } from '../../ui/call-state';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { costChange, duration } from '../run-figures';
import { RunsApi } from '../runs-api';

export interface RunChange {
  readonly run: Run;
  readonly patch: RunPatch;
  readonly title: string;
  /** The run that the parcels come from, for a move. */
  readonly from?: { readonly run: Run; readonly parcelId: number };
}

/** What a change would cost and break, before it is made. Closes with the run as saved. */
@Component({
  selector: 'db-run-change-dialog',
  imports: [MatButton, MatDialogModule, MatProgressBar, ProblemNote],
  template: `<h2 mat-dialog-title>{{ change.title }}</h2>
    <mat-dialog-content>
      @if (preview.isLoading()) {
        <mat-progress-bar mode="indeterminate" aria-label="Working it out" />
      }
      @if (effects(); as lines) {
        <ul>
          @for (line of lines; track line) {
            <li>{{ line }}</li>
          }
        </ul>
      }
      @if (problems().length > 0) {
        <p class="broken">
          {{
            isConfirmed
              ? 'A confirmed run must stay one that can be driven:'
              : 'It could not be confirmed like this:'
          }}
        </p>
        <ul>
          @for (line of problems(); track line) {
            <li>{{ line }}</li>
          }
        </ul>
      }
      @if (isConfirmed && !isRefused()) {
        <p class="db-hint">The people it concerns get a mail, and their calendars follow.</p>
      }
      <db-problem-note [message]="saving.message() ?? failed()" />
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="outlined" type="button" mat-dialog-close cdkFocusInitial>Leave it</button>
      <button
        matButton="filled"
        class="db-go"
        type="button"
        [disabled]="!preview.hasValue() || isRefused() || saving.busy()"
        (click)="save()"
      >
        Do it
      </button>
    </mat-dialog-actions>`,
  styles: `
    ul {
      margin: 0 0 8px;
      padding-left: 20px;
    }
    .broken {
      margin: 8px 0 4px;
      font-weight: 600;
      color: var(--db-clay-ink);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class RunChangeDialog {
  private readonly api = inject(RunsApi);
  private readonly dialog = inject<MatDialogRef<RunChangeDialog, Run>>(MatDialogRef);
  protected readonly change = inject<RunChange>(MAT_DIALOG_DATA);
  protected readonly isConfirmed = this.change.run.state === 'confirmed';
  protected readonly preview = rxResource({
    stream: () =>
      forkJoin({
        here: this.api.preview(this.change.run, this.change.patch),
        there: this.change.from
          ? this.api.preview(this.change.from.run, { removeParcelIds: [this.change.from.parcelId] })
          : of(null),
      }),
  });
  protected readonly failed = computed(() => errorText(this.preview.error()));
  protected readonly problems = computed(() =>
    this.preview.hasValue() ? this.preview.value().here.problems : [],
  );
  /** A confirmed run takes nothing on that would break it; taking off is always allowed while something stays. */
  protected readonly isRefused = computed(() => {
    if (!this.isConfirmed || !this.preview.hasValue() || this.problems().length === 0) return false;
    const isAdding = (this.change.patch.addParcelIds ?? []).length > 0;
    return isAdding || this.preview.value().here.after.parcels.length === 0;
  });
  protected readonly effects = computed(() => {
    if (!this.preview.hasValue()) return null;
    const { here, there } = this.preview.value();
    const { before, after, costChangeCents } = here;
    const minutes = Math.round(after.driveMinutes - before.driveMinutes);
    const lines = [costChange(costChangeCents)];
    if (minutes !== 0)
      lines.push(`The drive gets ${duration(Math.abs(minutes))} ${minutes > 0 ? 'longer' : 'shorter'}.`);
    if (after.departAt !== before.departAt && after.parcels.length > 0)
      lines.push(
        `It leaves at ${clock(after.departAt, after.zone)} instead of ${clock(before.departAt, before.zone)}.`,
      );
    lines.push(
      `The vehicle is filled with ${Math.round(after.loadL)} of ${Math.round(after.coordinator.capacityL)} L.`,
    );
    if (there) lines.push(costChange(there.costChangeCents, 'The run it leaves'));
    return lines;
  });
  protected readonly saving = new CallState();

  protected async save(): Promise<void> {
    const saved = await this.saving.run(this.api.change(this.change.run, this.change.patch));
    if (saved) this.dialog.close(saved);
  }
}
