import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import type { Counter, CounterNew } from '@shared/contract';
import { endMinuteOf, minuteOf, timeText } from '../ui/time-text';
import { weekdays } from '../ui/weekdays';

export type CounterAnswers = ReturnType<typeof counterAnswers>;
export type DayAnswers = ReturnType<typeof dayAnswers>;

const needed = (value = '') => new FormControl(value, { nonNullable: true, validators: Validators.required });
const time = () => new FormControl('', { nonNullable: true });
const yes = (value: boolean) => new FormControl(value, { nonNullable: true });

/** One weekday: whether it works for the circle, its cut-off and its hours, as values of time fields. */
function dayAnswers(isWorking: boolean) {
  return new FormGroup({ works: yes(isWorking), cutOff: time(), opens: time(), closes: time() });
}

/** The form of a counter, as a new one begins: a hold counter that works Monday to Friday. */
export function counterAnswers() {
  return new FormGroup({
    carrierId: new FormControl<number | null>(null, Validators.required),
    name: needed(),
    street: needed(),
    city: needed(),
    state: new FormControl<string | null>(null, Validators.required),
    postalCode: new FormControl('', {
      nonNullable: true,
      validators: [Validators.required, Validators.pattern(/^\d{5}$/)],
    }),
    lat: new FormControl<number | null>(null, [Validators.required, Validators.min(-90), Validators.max(90)]),
    lon: new FormControl<number | null>(null, [
      Validators.required,
      Validators.min(-180),
      Validators.max(180),
    ]),
    zone: needed('America/Chicago'),
    canDropOff: yes(false),
    canHold: yes(true),
    commit: needed('09:00'),
    active: yes(true),
    days: new FormArray(weekdays.map(({ iso }) => dayAnswers(iso <= 5))),
  });
}

type WeekdayKey = keyof Counter['cutOffMinutes'];
const keyOf = (index: number): WeekdayKey => String(index + 1) as WeekdayKey;

/** Puts a stored counter into the form. */
export function fillCounter(form: CounterAnswers, counter: Counter): void {
  const { carrierId, name, street, city, state, postalCode, lat, lon, zone, canDropOff, canHold, active } =
    counter;
  form.reset({
    ...{ carrierId, name, street, city, state, postalCode, lat, lon, zone, canDropOff, canHold, active },
    commit: timeText(counter.commitMinute),
    days: weekdays.map(({ iso }, index) => ({
      works: counter.workingDays.includes(iso),
      cutOff: timeText(counter.cutOffMinutes[keyOf(index)]),
      opens: timeText(counter.openingHours[keyOf(index)]?.openMinute),
      closes: timeText(counter.openingHours[keyOf(index)]?.closeMinute),
    })),
  });
}

/** The form as a request; call it on a valid form. Cut-offs only for a counter that takes parcels in. */
export function counterBody(form: CounterAnswers): CounterNew {
  const { commit, days, carrierId, state, lat, lon, ...plain } = form.getRawValue();
  const cutOffMinutes: CounterNew['cutOffMinutes'] = {};
  const openingHours: CounterNew['openingHours'] = {};
  days.forEach((day, index) => {
    const cutOff = endMinuteOf(day.cutOff);
    if (plain.canDropOff && cutOff !== null) cutOffMinutes[keyOf(index)] = cutOff;
    const [openMinute, closeMinute] = [minuteOf(day.opens), endMinuteOf(day.closes)];
    if (openMinute !== null && closeMinute !== null) openingHours[keyOf(index)] = { openMinute, closeMinute };
  });
  return {
    ...plain,
    carrierId: carrierId ?? 0,
    state: state ?? '',
    lat: lat ?? 0,
    lon: lon ?? 0,
    workingDays: weekdays.filter((_day, index) => days[index]?.works).map(({ iso }) => iso),
    cutOffMinutes,
    openingHours,
    commitMinute: minuteOf(commit) ?? 0,
  };
}

/** Gives every other working day the times of the first one. */
export function copyFirstDay(form: CounterAnswers): void {
  const working = form.controls.days.controls.filter((day) => day.controls.works.value);
  const [first, ...others] = working;
  if (!first) return;
  const { cutOff, opens, closes } = first.getRawValue();
  for (const day of others) day.patchValue({ cutOff, opens, closes });
  form.markAsDirty();
}

/** The API's paths where the form's differ. */
export const counterRenames: Readonly<Record<string, string>> = {
  commitMinute: 'commit',
  ...Object.fromEntries(
    weekdays.flatMap(({ iso }, index) => [
      [`cutOffMinutes.${iso}`, `days.${index}.cutOff`],
      [`openingHours.${iso}`, `days.${index}.closes`],
      [`openingHours.${iso}.openMinute`, `days.${index}.opens`],
      [`openingHours.${iso}.closeMinute`, `days.${index}.closes`],
    ]),
  ),
};
