import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({ selector: 'db-run-page', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
export class RunPage {}
