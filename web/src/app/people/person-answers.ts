import { FormControl, FormGroup, Validators } from '@angular/forms';
import type {
  BreederProfile,
  CoordinatorProfile,
  Person,
  PersonNew,
  PersonPatch,
  Role,
} from '@shared/contract';
import { endMinuteOf, minuteOf, timeText } from '../ui/time-text';

export type PersonAnswers = ReturnType<typeof personAnswers>;

const text = (value = '') => new FormControl(value, { nonNullable: true });
const needed = (value = '') => new FormControl(value, { nonNullable: true, validators: Validators.required });
const yes = (value = false) => new FormControl(value, { nonNullable: true });
const number = (value: number) =>
  new FormControl<number | null>(value, [Validators.required, Validators.min(0)]);

/** The form of a person. The profiles begin with what is usual in a circle; they count only with their role. */
export function personAnswers() {
  return new FormGroup({
    email: new FormControl('', { nonNullable: true, validators: [Validators.required, Validators.email] }),
    name: needed(),
    businessName: text(),
    phone: text(),
    street: text(),
    city: text(),
    state: new FormControl<string | null>(null),
    postalCode: new FormControl('', { nonNullable: true, validators: Validators.pattern(/^\d{5}$/) }),
    zone: text('America/Chicago'),
    roles: new FormGroup({ breeder: yes(), coordinator: yes(), buyer: yes(), admin: yes() }),
    breeder: new FormGroup({
      opens: needed('09:00'),
      closes: needed('13:00'),
      serviceMinutes: number(10),
      dropOffCounterId: new FormControl<number | null>(null, Validators.required),
    }),
    coordinator: new FormGroup({
      capacityL: number(160),
      longestRunMinutes: number(300),
      dollarsPerMile: number(0.7),
      freeWeekdays: new FormControl<number[]>([], { nonNullable: true }),
    }),
  });
}

/** Lets a profile be checked only while its role is chosen. */
export function followRoles(form: PersonAnswers): void {
  const { roles, breeder, coordinator } = form.controls;
  toggle(breeder, roles.controls.breeder.value);
  toggle(coordinator, roles.controls.coordinator.value);
}

function toggle(group: FormGroup, isOn: boolean): void {
  if (isOn === group.enabled) return;
  if (isOn) group.enable({ emitEvent: false });
  else group.disable({ emitEvent: false });
}

/** Puts a stored person into the form. */
export function fillPerson(form: PersonAnswers, person: Person): void {
  const { email, name, state, zone, breeder, coordinator } = person;
  form.reset({
    ...{ email, name, state, zone },
    businessName: person.businessName ?? '',
    phone: person.phone ?? '',
    street: person.street ?? '',
    city: person.city ?? '',
    postalCode: person.postalCode ?? '',
    roles: Object.fromEntries(person.roles.map((role) => [role, true])),
    ...(breeder && { breeder: { ...breeder, ...windowOf(breeder) } }),
    ...(coordinator && { coordinator: { ...coordinator, dollarsPerMile: coordinator.centsPerMile / 100 } }),
  });
  followRoles(form);
}

const windowOf = ({ windowOpenMinute, windowCloseMinute }: BreederProfile) => ({
  opens: timeText(windowOpenMinute),
  closes: timeText(windowCloseMinute),
});

/** The roles that are ticked. */
export function rolesOf(form: PersonAnswers): Role[] {
  const ticked = form.controls.roles.getRawValue();
  return (['breeder', 'coordinator', 'buyer', 'admin'] as const).filter((role) => ticked[role]);
}

function profilesOf(form: PersonAnswers): { breeder?: BreederProfile; coordinator?: CoordinatorProfile } {
  const { breeder, coordinator } = form.getRawValue();
  const roles = rolesOf(form);
  return {
    ...(roles.includes('breeder') && {
      breeder: {
        windowOpenMinute: minuteOf(breeder.opens) ?? 0,
        windowCloseMinute: endMinuteOf(breeder.closes) ?? 0,
        serviceMinutes: breeder.serviceMinutes ?? 0,
        dropOffCounterId: breeder.dropOffCounterId ?? 0,
      },
    }),
    ...(roles.includes('coordinator') && {
      coordinator: {
        capacityL: coordinator.capacityL ?? 0,
        longestRunMinutes: coordinator.longestRunMinutes ?? 0,
        centsPerMile: Math.round((coordinator.dollarsPerMile ?? 0) * 100),
        freeWeekdays: coordinator.freeWeekdays.toSorted((a, b) => a - b),
      },
    }),
  };
}

function ownOf(form: PersonAnswers) {
  const { name, businessName, phone, street, city, state, postalCode, zone } = form.getRawValue();
  const or = (value: string) => value.trim() || null;
  return {
    ...{ name, state, zone },
    businessName: or(businessName),
    phone: or(phone),
    street: or(street),
    city: or(city),
    postalCode: or(postalCode),
  };
}

/** The form as an invitation; call it on a valid form. */
export const personNewBody = (form: PersonAnswers): PersonNew => ({
  ...ownOf(form),
  email: form.controls.email.value.trim(),
  roles: rolesOf(form),
  ...profilesOf(form),
});

/** The form as a change. A profile whose role was taken away stays as it is, for the day the role comes back. */
export const personPatchBody = (form: PersonAnswers): PersonPatch => ({
  ...ownOf(form),
  roles: rolesOf(form),
  ...profilesOf(form),
});

/** The API's paths where the form's differ. */
export const personRenames: Readonly<Record<string, string>> = {
  'breeder.windowOpenMinute': 'breeder.opens',
  'breeder.windowCloseMinute': 'breeder.closes',
  'coordinator.centsPerMile': 'coordinator.dollarsPerMile',
};
