import { Pipe, type PipeTransform } from '@angular/core';
import { dayLabel, type DayStyle } from './dates';

/** `{{ parcel.shipDate | dayLabel: 'medium' }}`. */
@Pipe({ name: 'dayLabel' })
export class DayLabelPipe implements PipeTransform {
  transform(date: string | null | undefined, style: DayStyle = 'long'): string {
    return date ? dayLabel(date, style) : '';
  }
}
