import { ChangeDetectionStrategy, Component, input } from '@angular/core';

export type EmptyPicture = 'bench' | 'road' | 'counter' | 'calendar' | 'calm' | 'search';

/** Nothing here yet: a small picture, a sentence, and what to do (projected). */
@Component({
  selector: 'db-empty-state',
  templateUrl: './empty-state.html',
  styleUrl: './empty-state.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class EmptyState {
  readonly picture = input<EmptyPicture>('bench');
  readonly heading = input.required<string>();
  readonly text = input('');
}
