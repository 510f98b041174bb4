import { Pipe, type PipeTransform } from '@angular/core';
import type { ValidationErrors } from '@angular/forms';
import { fieldMessage } from './problem';

/** `{{ form.controls.email.errors | fieldMessage }}` inside a `<mat-error>`. */
@Pipe({ name: 'fieldMessage' })
export class FieldMessagePipe implements PipeTransform {
  transform(errors: ValidationErrors | null): string {
    return fieldMessage(errors);
  }
}
