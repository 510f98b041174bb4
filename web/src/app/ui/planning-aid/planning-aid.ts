import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

/** Who has the last word about safety; stands wherever the program speaks of a safe day. */
@Component({
  selector: 'db-planning-aid',
  imports: [RouterLink],
  template: `<p class="db-note">
    A planning aid, worked out from forecasts and your circle's limits. It decides nothing: your carrier's
    terms, local law and your veterinarian come first.
    <a routerLink="/how">How this is worked out</a>
  </p>`,
  styles: `
    :host {
      display: block;
    }
    p {
      margin: 0;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PlanningAid {}
