import { FormControl, FormGroup, Validators } from '@angular/forms';
import type { Blackout, BlackoutNew, BlackoutScope } from '@shared/contract';
import { canBeObserved, readYearlyRules, yearlyRules } from './observed-rule';
import type { Nth, YearlyChoice } from './yearly-rule';

export type BlackoutAnswers = ReturnType<typeof blackoutAnswers>;
type Kind = Blackout['kind'];
/** How a yearly day is said: by its date, by its weekday, or by a written rule. */
type YearlyBy = YearlyChoice['kind'] | 'written';

/** The form of a blackout, empty. Dates are `YYYY-MM-DD`, an empty text for none. */
export function blackoutAnswers() {
  return new FormGroup({
    title: new FormControl('', { nonNullable: true, validators: Validators.required }),
    kind: new FormControl<Kind>('date', { nonNullable: true }),
    startDate: new FormControl('', { nonNullable: true }),
    endDate: new FormControl('', { nonNullable: true }),
    yearlyBy: new FormControl<YearlyBy>('fixed', { nonNullable: true }),
    month: new FormControl(1, { nonNullable: true }),
    day: new FormControl(1, { nonNullable: true }),
    nth: new FormControl<Nth>(1, { nonNullable: true }),
    weekday: new FormControl(1, { nonNullable: true }),
    isObserved: new FormControl(false, { nonNullable: true }),
    rules: new FormControl('', { nonNullable: true }),
    scope: new FormControl<BlackoutScope>('everywhere', { nonNullable: true }),
    carrierId: new FormControl<number | null>(null),
    state: new FormControl<string | null>(null),
    counterId: new FormControl<number | null>(null),
    liftedDates: new FormControl<string[]>([], { nonNullable: true }),
    note: new FormControl('', { nonNullable: true, validators: Validators.maxLength(500) }),
  });
}

/** Puts a stored blackout into the form; what the plain choices do not know stands in the written form. */
export function fillAnswers(form: BlackoutAnswers, blackout: Blackout): void {
  const { kind, rules, liftedDates } = blackout;
  const isYearly = kind === 'yearly';
  form.reset({
    title: blackout.title,
    kind,
    startDate: isYearly ? '' : (blackout.startDate ?? ''),
    endDate: isYearly ? '' : (blackout.endDate ?? ''),
    rules: rules ?? '',
    ...(isYearly ? yearlyAnswers(rules ?? '') : {}),
    scope: blackout.scope,
    carrierId: blackout.carrierId,
    state: blackout.state,
    counterId: blackout.counterId,
    liftedDates: [...liftedDates],
    note: blackout.note,
  });
}

function yearlyAnswers(rules: string) {
  const answer = readYearlyRules(rules);
  if (!answer) return { yearlyBy: 'written' as const };
  const { choice, isObserved } = answer;
  if (choice.kind === 'nth')
    return { yearlyBy: choice.kind, month: choice.month, weekday: choice.weekday, nth: choice.nth };
  return { yearlyBy: choice.kind, month: choice.month, day: choice.day, isObserved };
}

/** The choice that the yearly fields make; null for a written rule. */
export function choiceOf(form: BlackoutAnswers): YearlyChoice | null {
  const { yearlyBy, month, day, nth, weekday } = form.getRawValue();
  if (yearlyBy === 'written') return null;
  return yearlyBy === 'fixed' ? { kind: 'fixed', month, day } : { kind: 'nth', month, weekday, nth };
}

/** The form as a request. `seen` is the blackout being edited: a yearly one keeps its own first and last day. */
export function bodyOf(form: BlackoutAnswers, seen: Blackout | null): BlackoutNew {
  const value = form.getRawValue();
  const { kind, scope } = value;
  const bounds = seen?.kind === 'yearly' ? seen : { startDate: null, endDate: null };
  const choice = choiceOf(form);
  const isObserved = value.isObserved && choice !== null && canBeObserved(choice);
  const written = choice ? yearlyRules({ choice, isObserved }) : value.rules.trim();
  return {
    title: value.title,
    kind,
    startDate: kind === 'yearly' ? bounds.startDate : value.startDate || null,
    endDate: kind === 'yearly' ? bounds.endDate : kind === 'range' ? value.endDate || null : null,
    rules: kind === 'yearly' ? written || null : null,
    liftedDates: kind === 'date' ? [] : value.liftedDates,
    scope,
    carrierId: scope === 'carrier' ? value.carrierId : null,
    state: scope === 'state' ? value.state : null,
    counterId: scope === 'counter' ? value.counterId : null,
    note: value.note,
  };
}

/** The field where a complaint about the rules belongs, by how the yearly day is said. */
export function renamedFields(form: BlackoutAnswers): Readonly<Record<string, string>> {
  const field: Record<YearlyBy, string> = { fixed: 'day', nth: 'nth', written: 'rules' };
  const renamed: Record<string, string> = { rules: field[form.controls.yearlyBy.value] };
  const members = ['title', 'startDate', 'endDate', 'rules', 'carrierId', 'state', 'counterId', 'note'];
  return Object.fromEntries(
    members.flatMap((name) => [
      [name, renamed[name] ?? name],
      // The preview holds the blackout one level deeper.
      [`blackout.${name}`, renamed[name] ?? name],
    ]),
  );
}
