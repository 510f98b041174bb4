import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { RouteCheck, Service } from '@shared/contract';
import type { RouteAnswers } from '../core/route-answers';
import { contentLines, contentsForm, type ContentsForm } from '../ui/contents-rows/contents-form';

export type CheckForm = FormGroup<{
  service: FormControl<Service>;
  counterId: FormControl<number | null>;
  postalCode: FormControl<string>;
  contents: ContentsForm;
  boxId: FormControl<number | null>;
  /** Null: the person's own counter. */
  dropOffCounterId: FormControl<number | null>;
}>;

/** The form of a route check, filled with what is known of the answers. */
export function checkForm(answers: RouteAnswers): CheckForm {
  return new FormGroup({
    service: new FormControl<Service>(answers.service, { nonNullable: true }),
    counterId: new FormControl<number | null>(answers.counterId),
    postalCode: new FormControl(answers.postalCode ?? '', {
      nonNullable: true,
      validators: Validators.pattern(/^\d{5}$/),
    }),
    contents: contentsForm(answers.contents),
    boxId: new FormControl<number | null>(answers.boxId, Validators.required),
    dropOffCounterId: new FormControl<number | null>(answers.dropOffCounterId),
  });
}

/** The form as a question; null while something it needs is not answered. */
export function questionOf(form: CheckForm): RouteCheck | null {
  const { service, counterId, postalCode, boxId, dropOffCounterId } = form.getRawValue();
  const contents = contentLines(form.controls.contents);
  const destination = destinationOf(service, counterId, postalCode.trim());
  if (!contents || !destination || boxId === null) return null;
  return {
    destination,
    service,
    contents,
    boxId,
    ...(dropOffCounterId === null ? {} : { dropOffCounterId }),
  };
}

/** The form as answers to carry over to a parcel. */
export function answersOf(form: CheckForm, date: string | null): RouteAnswers {
  const { service, counterId, postalCode, boxId, dropOffCounterId } = form.getRawValue();
  return {
    service,
    counterId: service === 'hold' ? counterId : null,
    postalCode: service === 'door' ? postalCode.trim() : null,
    contents: contentLines(form.controls.contents) ?? [],
    boxId,
    dropOffCounterId,
    date,
  };
}

function destinationOf(
  service: Service,
  counterId: number | null,
  postalCode: string,
): RouteCheck['destination'] | null {
  if (service === 'hold') return counterId === null ? null : { counterId };
  return /^\d{5}$/.test(postalCode) ? { postalCode } : null;
}
