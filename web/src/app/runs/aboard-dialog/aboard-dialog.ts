import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MAT_DIALOG_DATA, MatDialogModule } from '@angular/material/dialog';
import type { Run } from '@shared/contract';

/** Ticks what is aboard when the driver leaves for the counter. Closes with the ids of the parcels aboard. */
@Component({
  selector: 'db-aboard-dialog',
  imports: [MatButton, MatCheckbox, MatDialogModule],
  template: `<h2 mat-dialog-title>What is aboard?</h2>
    <mat-dialog-content>
      <p>A parcel that stays behind goes on hold, and its people are told.</p>
      <div role="group" aria-label="Parcels aboard">
        @for (parcel of run.parcels; track parcel.id) {
          <mat-checkbox [checked]="aboard().has(parcel.id)" (change)="set(parcel.id, $event.checked)">
            {{ parcel.code }}, {{ parcel.what }} of {{ parcel.breederName }}
          </mat-checkbox>
        }
      </div>
      <p class="db-hint" role="status">{{ left() === 0 ? 'All are aboard.' : left() + ' stay behind.' }}</p>
    </mat-dialog-content>
    <mat-dialog-actions align="end">
      <button matButton="outlined" type="button" mat-dialog-close>Back</button>
      <button
        matButton="filled"
        class="db-go"
        type="button"
        [disabled]="aboard().size === 0"
        [mat-dialog-close]="ids()"
        cdkFocusInitial
      >
        On the road
      </button>
    </mat-dialog-actions>`,
  styles: `
    mat-checkbox {
      display: block;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AboardDialog {
  protected readonly run = inject<Run>(MAT_DIALOG_DATA);
  protected readonly aboard = signal<ReadonlySet<number>>(
    new Set(this.run.parcels.map((parcel) => parcel.id)),
  );
  protected readonly ids = computed(() => [...this.aboard()]);
  protected readonly left = computed(() => this.run.parcels.length - this.aboard().size);

  protected set(id: number, isAboard: boolean): void {
    const next = new Set(this.aboard());
    if (isAboard) next.add(id);
    else next.delete(id);
    this.aboard.set(next);
  }
}
