import { Pipe, type PipeTransform } from '@angular/core';
import { clock } from './dates';

/** `{{ run.departAt | clock: run.zone }}`: the zone's name comes along where it could be in doubt. */
@Pipe({ name: 'clock' })
export class ClockPipe implements PipeTransform {
  transform(
    instant: string | null | undefined,
    zone: string,
    zoneName: 'auto' | 'always' | 'never' = 'auto',
  ): string {
    return instant ? clock(instant, zone, zoneName) : '';
  }
}
