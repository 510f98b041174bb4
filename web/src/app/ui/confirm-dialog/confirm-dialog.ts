import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MAT_DIALOG_DATA, type MatDialog, MatDialogModule } from '@angular/material/dialog';
import { firstValueFrom } from 'rxjs';

/** A question before something that is hard to take back; the buttons say what they do. */
export interface Question {
  readonly title: string;
  readonly text: string;
  readonly yes: string;
  readonly no: string;
}

@Component({
  selector: 'db-confirm-dialog',
  imports: [MatButton, MatDialogModule],
  template: `<h2 mat-dialog-title>{{ question.title }}</h2>
    <mat-dialog-content>
      <p>{{ question.text }}</p>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="outlined" type="button" [mat-dialog-close]="false" cdkFocusInitial>
        {{ question.no }}
      </button>
      <button matButton="filled" class="db-go" type="button" [mat-dialog-close]="true">
        {{ question.yes }}
      </button>
    </mat-dialog-actions>`,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ConfirmDialog {
  protected readonly question = inject<Question>(MAT_DIALOG_DATA);
}

/** Asks; false also when the dialog was closed without an answer. The focus returns to where it was. */
export async function confirmed(dialog: MatDialog, question: Question): Promise<boolean> {
  const opened = dialog.open<ConfirmDialog, Question, boolean>(ConfirmDialog, {
    data: question,
    width: '440px',
  });
  return (await firstValueFrom(opened.afterClosed())) === true;
}
