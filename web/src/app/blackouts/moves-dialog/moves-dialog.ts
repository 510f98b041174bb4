import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, type MatDialog, MatDialogModule } from '@angular/material/dialog';
import { MatIcon } from '@angular/material/icon';
import { firstValueFrom } from 'rxjs';
import type { BlackoutPreview } from '@shared/contract';
import { DayLabelPipe } from '../../core/day-label-pipe';
import { movesText, yesText } from '../moves-text';

export interface Moves {
  readonly title: string;
  readonly preview: BlackoutPreview;
  readonly isRemoval: boolean;
}

/** Before saving: which days close, and which parcels, runs and people that moves. Asks. */
@Component({
  selector: 'db-moves-dialog',
  imports: [DayLabelPipe, MatButton, MatDialogModule, MatIcon],
  templateUrl: './moves-dialog.html',
  styleUrl: './moves-dialog.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class MovesDialog {
  protected readonly moves = inject<Moves>(MAT_DIALOG_DATA);
  protected readonly summary = computed(() => movesText(this.moves.preview, this.moves.isRemoval));
  protected readonly yes = computed(() => yesText(this.moves.preview, this.moves.isRemoval));
  protected readonly shownDays = this.moves.preview.days.slice(0, 12);
  protected readonly moreDays = this.moves.preview.days.length - this.shownDays.length;
}

/** Shows what would move and asks whether to go on. */
export async function movesAccepted(dialog: MatDialog, moves: Moves): Promise<boolean> {
  const opened = dialog.open<MovesDialog, Moves, boolean>(MovesDialog, {
    data: moves,
    width: '620px',
    maxWidth: '94vw',
  });
  return (await firstValueFrom(opened.afterClosed())) === true;
}
