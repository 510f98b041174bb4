import { ChangeDetectionStrategy, Component, computed, inject, viewChildren } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import type { AbstractControl } from '@angular/forms';
import { MatProgressBar } from '@angular/material/progress-bar';
import { forkJoin } from 'rxjs';
import type { Availability, Person } from '@shared/contract';
import { SessionStore } from '../../core/session/session-store';
import { errorText } from '../../ui/call-state';
import { PageHeader } from '../../ui/page-header/page-header';
import { dateIn } from '../../ui/plain-dates';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import type { HasUnsavedChanges } from '../../ui/unsaved-guard';
import { AccountApi } from '../account-api';
import { AwayDays } from '../away-days/away-days';
import { CollectionForm } from '../collection-form/collection-form';
import { DrivingForm } from '../driving-form/driving-form';
import { FeedCard } from '../feed-card/feed-card';
import { LookChoice } from '../look-choice/look-choice';
import { OwnFacts } from '../own-facts/own-facts';
import { PasswordForm } from '../password-form/password-form';
import { SingleDays } from '../single-days/single-days';

/** What a person keeps of themselves: facts, days, calendar, password and looks, each saved by itself. */
@Component({
  selector: 'db-account-page',
  imports: [
    AwayDays,
    CollectionForm,
    DrivingForm,
    FeedCard,
    LookChoice,
    MatProgressBar,
    OwnFacts,
    PageHeader,
    PasswordForm,
    ProblemNote,
    SingleDays,
  ],
  host: { '(window:beforeunload)': 'warnOfLoss($event)' },
  templateUrl: './account-page.html',
  styleUrl: './account-page.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AccountPage implements HasUnsavedChanges {
  private readonly api = inject(AccountApi);
  private readonly session = inject(SessionStore);

  private readonly sections = viewChildren<{ readonly form: AbstractControl }>('section');
  protected readonly loading = rxResource({
    stream: () => forkJoin({ person: this.api.me(), availability: this.api.availability() }),
  });
  protected readonly problem = computed(() => errorText(this.loading.error()));
  protected readonly known = computed(() => (this.loading.hasValue() ? this.loading.value() : null));
  protected readonly today = computed(() =>
    dateIn(this.known()?.person.zone ?? this.session.circleZone(), new Date()),
  );
  protected readonly rolesText = computed(() => this.known()?.person.roles.join(', ') ?? null);

  hasUnsavedChanges(): boolean {
    return this.sections().some((section) => section.form.dirty);
  }

  protected warnOfLoss(event: BeforeUnloadEvent): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  /** The name in the navigation and the unit of all pages follow. */
  protected async personSaved(person: Person): Promise<void> {
    const known = this.known();
    if (known) this.loading.set({ ...known, person });
    await this.session.refresh().catch(() => undefined);
  }

  protected daysSaved(availability: Availability): void {
    const known = this.known();
    if (known) this.loading.set({ ...known, availability });
  }
}
