import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({ selector: 'db-new-run', template: '', changeDetection: ChangeDetectionStrategy.OnPush })
export class NewRun {}
