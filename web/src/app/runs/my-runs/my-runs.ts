import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({ selector: 'db-my-runs', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
export class MyRuns {}
