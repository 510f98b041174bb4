import { HttpClient } from '@angular/common/http';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  signal,
  untracked,
} from '@angular/core';
import { rxResource, takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatIcon } from '@angular/material/icon';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatOption, MatSelect } from '@angular/material/select';
import type { Counter, Person } from '@shared/contract';
import { map, startWith } from 'rxjs';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { errorText } from '../../ui/call-state';
import { confirmed } from '../../ui/confirm-dialog/confirm-dialog';
import { EditPage } from '../../ui/edit-page';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { onVersion } from '../../ui/save-state';
import { usStates } from '../../ui/us-states';
import { zoneChoices } from '../../ui/us-zones';
import { WeekdayToggle } from '../../ui/weekday-toggle/weekday-toggle';
import { personState, stateWords } from '../people-words';
import {
  fillPerson,
  followRoles,
  personAnswers,
  personNewBody,
  personPatchBody,
  personRenames,
  rolesOf,
} from '../person-answers';

/** Invite somebody, or change a person: roles, profiles, whether they can sign in. */
@Component({
  selector: 'db-person-form',
  imports: [
    FieldMessagePipe,
    MatButton,
    MatCheckbox,
    MatFormFieldModule,
    MatIcon,
    MatInput,
    MatOption,
    MatProgressBar,
    MatSelect,
    NextAction,
    PageHeader,
    ProblemNote,
    ReactiveFormsModule,
    WeekdayToggle,
  ],
  templateUrl: './person-form.html',
  styleUrl: './person-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PersonForm extends EditPage<Person> {
  private readonly http = inject(HttpClient);
  private readonly dialog = inject(MatDialog);

  protected readonly form = personAnswers();
  protected readonly usStates = usStates;
  private readonly listed = rxResource({ stream: () => this.http.get<Counter[]>('/api/counters') });
  protected readonly problem = computed(() => errorText(this.loaded.error() ?? this.listed.error()));
  protected readonly value = toSignal(
    this.form.valueChanges.pipe(
      startWith(null),
      map(() => this.form.getRawValue()),
    ),
    { requireSync: true },
  );
  /** Counters that take parcels in, and the one that is chosen even when it does no more. */
  protected readonly counters = computed(() => {
    const all = this.listed.hasValue() ? this.listed.value() : [];
    const chosen = this.value().breeder.dropOffCounterId;
    return all.filter((counter) => (counter.active && counter.canDropOff) || counter.id === chosen);
  });
  protected readonly zones = computed(() => zoneChoices(this.value().zone));
  protected readonly state = computed(() => {
    const seen = this.seen();
    return seen ? stateWords[personState(seen)] : null;
  });
  protected readonly roleBoxes = [
    { role: 'breeder', about: 'ships parcels' },
    { role: 'coordinator', about: 'drives runs' },
    { role: 'buyer', about: 'receives animals' },
    { role: 'admin', about: 'keeps the circle' },
  ] as const;
  protected readonly roleProblem = signal('');

  constructor() {
    super();
    effect(() => {
      const seen = this.seen();
      // Switching somebody on or off brings a new version, but must not lose what is being typed.
      if (seen && !this.form.dirty) untracked(() => fillPerson(this.form, seen));
    });
    followRoles(this.form);
    this.form.controls.roles.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => {
      this.roleProblem.set('');
      followRoles(this.form);
    });
  }

  protected override fetch(id: string) {
    return this.http.get<Person>(`/api/people/${id}`);
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.saving.busy()) return;
    this.roleProblem.set(rolesOf(this.form).length === 0 ? 'Choose at least one role.' : '');
    if (this.form.invalid || this.roleProblem()) return this.refuse();
    const seen = this.seen();
    const call = seen
      ? this.http.patch<Person>(`/api/people/${seen.id}`, personPatchBody(this.form), onVersion(seen))
      : this.http.post<Person>('/api/people', personNewBody(this.form));
    const saved = await this.saving.save(call, this.form, personRenames);
    if (!saved) return this.showFirstError();
    await this.leave(seen ? `${saved.name} is saved.` : `${saved.name} was sent an invitation.`, '/people');
  }

  /** A fresh link to choose a password with; older ones end. */
  protected async invite(seen: Person): Promise<void> {
    const call = this.http.post(`/api/people/${seen.id}/invitation`, {}).pipe(map(() => true));
    if (await this.saving.save(call, this.form)) this.say(`A fresh link is on its way to ${seen.email}.`);
  }

  /** Switching off asks first: the person's sessions end at once. */
  protected async setActive(seen: Person, active: boolean): Promise<void> {
    const question = {
      title: `Switch ${seen.name} off?`,
      text: 'They are signed out and cannot sign in until you switch them on again. Nothing of theirs is lost.',
      yes: 'Switch off',
      no: 'Leave on',
    };
    if (!active && !(await confirmed(this.dialog, question))) return;
    const call = this.http.patch<Person>(`/api/people/${seen.id}`, { active }, onVersion(seen));
    const saved = await this.saving.save(call, this.form);
    if (!saved) return;
    this.say(`${saved.name} is switched ${active ? 'on' : 'off'}.`);
    this.loaded.set(saved);
  }

  protected override again(): void {
    super.again();
    this.form.markAsPristine();
    this.listed.reload();
  }
}
