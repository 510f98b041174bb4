import {
  FormControl,
  FormGroup,
  Validators,
  type AbstractControl,
  type ValidationErrors,
} from '@angular/forms';
import type { ContentLine, Parcel, ParcelNew, ParcelPatch, Service } from '@shared/contract';
import type { RouteAnswers } from '../../core/route-answers';
import { contentsForm, resetContents } from '../../ui/contents-rows/contents-form';
import { addDays } from '../../ui/plain-dates';

export type ParcelForm = ReturnType<typeof parcelForm>;

/** How long a new parcel may wait for its day unless somebody says otherwise: the fortnight that the strip shows. */
const usualSpanDays = 13;

/** The form of a parcel, empty. The limits are those of the contract, which has the last word. */
export function parcelForm() {
  const form = new FormGroup({
    breederId: new FormControl<number | null>(null),
    buyer: new FormGroup({
      name: text(120, Validators.required),
      email: text(254, Validators.required, Validators.email),
      phone: text(30),
    }),
    contents: contentsForm(),
    boxId: new FormControl<number | null>(null, Validators.required),
    service: new FormControl<Service>('hold', { nonNullable: true }),
    holdCounterId: new FormControl<number | null>(null, Validators.required),
    door: new FormGroup({
      street: text(160, Validators.required),
      city: text(80, Validators.required),
      state: text(2, Validators.required, Validators.pattern(/^[A-Za-z]{2}$/)),
      postalCode: text(5, Validators.required, Validators.pattern(/^\d{5}$/)),
    }),
    dropOffCounterId: new FormControl<number | null>(null),
    readyFrom: text(10, Validators.required),
    latestDate: text(10, Validators.required, notBeforeReady),
    lastMealDate: text(10),
    note: text(1000),
  });
  followService(form);
  return form;
}

/** Only the fields of the service that is chosen are asked for. */
export function followService(form: ParcelForm): void {
  const { service, holdCounterId, door } = form.controls;
  const isDoor = service.value === 'door';
  if (isDoor) {
    door.enable({ emitEvent: false });
    holdCounterId.disable({ emitEvent: false });
  } else {
    door.disable({ emitEvent: false });
    holdCounterId.enable({ emitEvent: false });
  }
  form.updateValueAndValidity({ emitEvent: false });
}

/** A new parcel: the usual span from today, and what a route check had answered already. */
export function fillNew(form: ParcelForm, answers: RouteAnswers, today: string): void {
  const start = answers.date !== null && answers.date > today ? answers.date : today;
  form.patchValue({
    service: answers.service,
    holdCounterId: answers.counterId,
    door: { postalCode: answers.postalCode ?? '' },
    boxId: answers.boxId,
    dropOffCounterId: answers.dropOffCounterId,
    readyFrom: today,
    latestDate: addDays(start, usualSpanDays),
  });
  resetContents(form.controls.contents, answers.contents);
  followService(form);
}

/** A stored parcel's facts. */
export function fillFrom(form: ParcelForm, parcel: Parcel): void {
  const { destination } = parcel;
  form.patchValue({
    buyer: { ...parcel.buyer, phone: parcel.buyer.phone ?? '' },
    boxId: parcel.box.id,
    service: parcel.service,
    holdCounterId: destination.counterId,
    door:
      parcel.service === 'door'
        ? {
            street: destination.street,
            city: destination.city,
            state: destination.state,
            postalCode: destination.postalCode,
          }
        : {},
    dropOffCounterId: parcel.dropOff.counterId,
    readyFrom: parcel.readyFrom,
    latestDate: parcel.latestDate,
    lastMealDate: parcel.lastMealDate ?? '',
    note: parcel.note,
  });
  resetContents(
    form.controls.contents,
    parcel.contents.map(({ speciesId, quantity, massG }) => ({ speciesId, quantity, massG })),
  );
  followService(form);
}

/** The form as the facts that `POST` and `PATCH` share; for a valid form. */
export function factsOf(form: ParcelForm) {
  const value = form.getRawValue();
  const isDoor = value.service === 'door';
  return {
    buyer: {
      name: value.buyer.name,
      email: value.buyer.email.trim(),
      phone: value.buyer.phone.trim() || null,
    },
    contents: value.contents as ContentLine[],
    boxId: value.boxId ?? 0,
    service: value.service,
    holdCounterId: isDoor ? null : value.holdCounterId,
    door: isDoor ? value.door : null,
    readyFrom: value.readyFrom,
    latestDate: value.latestDate,
    lastMealDate: value.lastMealDate || null,
    note: value.note,
  };
}

/** The body of `POST /api/parcels`. */
export function newBody(form: ParcelForm): ParcelNew {
  const { breederId, dropOffCounterId } = form.getRawValue();
  return {
    ...factsOf(form),
    ...(breederId === null ? {} : { breederId }),
    ...(dropOffCounterId === null ? {} : { dropOffCounterId }),
  };
}

/** The body of `PATCH /api/parcels/:id`; of a parcel that is under way only the note can change. */
export function patchBody(form: ParcelForm, isNoteOnly: boolean): ParcelPatch {
  if (isNoteOnly) return { note: form.controls.note.value };
  const { dropOffCounterId } = form.getRawValue();
  return { ...factsOf(form), ...(dropOffCounterId === null ? {} : { dropOffCounterId }) };
}

/** The states whose facts can still change (the API's rule in edit-parcel.ts, which has the last word). */
export const isNoteOnly = (parcel: Parcel): boolean =>
  !['draft', 'seeking', 'booked', 'on-hold'].includes(parcel.state);

function text(longest: number, ...validators: ((control: AbstractControl) => ValidationErrors | null)[]) {
  return new FormControl('', {
    nonNullable: true,
    validators: [Validators.maxLength(longest), ...validators],
  });
}

/** The latest day is not before the first; plain dates compare as text. */
function notBeforeReady(control: AbstractControl<string>): ValidationErrors | null {
  const ready = control.parent?.get('readyFrom')?.value as string | undefined;
  return ready && control.value && control.value < ready
    ? { order: 'The latest day is before the first.' }
    : null;
}
