import { Pipe, type PipeTransform } from '@angular/core';

const dollars = new Intl.NumberFormat(undefined, { style: 'currency', currency: 'USD' });

/** Integer cents as US dollars in the person's locale: `940` → `$9.40`. */
@Pipe({ name: 'money' })
export class MoneyPipe implements PipeTransform {
  transform(cents: number | null | undefined): string {
    return cents == null ? '' : dollars.format(cents / 100);
  }
}
