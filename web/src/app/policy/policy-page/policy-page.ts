import { HttpClient, httpResource } from '@angular/common/http';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  signal,
  untracked,
} from '@angular/core';
import { ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatDialog } from '@angular/material/dialog';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatProgressBar } from '@angular/material/progress-bar';
import { MatSnackBar } from '@angular/material/snack-bar';
import { RouterLink } from '@angular/router';
import { map, startWith } from 'rxjs';
import type { PolicyAnswer } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SessionStore } from '../../core/session/session-store';
import { UnitPreference } from '../../core/unit-preference';
import { errorText } from '../../ui/call-state';
import { confirmed } from '../../ui/confirm-dialog/confirm-dialog';
import { focusFirstError } from '../../ui/focus-first-error';
import { NextAction } from '../../ui/next-action/next-action';
import { PageHeader } from '../../ui/page-header/page-header';
import { BasisMark } from '../../ui/policy-table/basis-mark';
import { PolicyTable } from '../../ui/policy-table/policy-table';
import {
  policySections,
  readValue,
  withUnit,
  withValues,
  type PolicyRow,
} from '../../ui/policy-table/policy-values';
import { ProblemNote } from '../../ui/problem-note/problem-note';
import { onVersion, SaveState } from '../../ui/save-state';
import type { HasUnsavedChanges } from '../../ui/unsaved-guard';
import { controlNames, policyForm, type PolicyForm } from '../policy-form';
import { VersionList } from '../version-list/version-list';

/** The circle's settings behind every verdict. All who ship read them; an admin changes them, one version a save. */
@Component({
  selector: 'db-policy-page',
  imports: [
    BasisMark,
    FieldMessagePipe,
    MatButton,
    MatFormFieldModule,
    MatInput,
    MatProgressBar,
    NextAction,
    PageHeader,
    PolicyTable,
    ProblemNote,
    ReactiveFormsModule,
    RouterLink,
    VersionList,
  ],
  templateUrl: './policy-page.html',
  styleUrl: './policy-page.scss',
  host: { '(window:beforeunload)': 'warn($event)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class PolicyPage implements HasUnsavedChanges {
  private readonly http = inject(HttpClient);
  private readonly session = inject(SessionStore);
  private readonly snack = inject(MatSnackBar);
  private readonly dialog = inject(MatDialog);
  private readonly host = inject<ElementRef<HTMLElement>>(ElementRef);
  private readonly unit = inject(UnitPreference).unit;

  protected readonly withUnit = withUnit;
  protected readonly canEdit = computed(() => this.session.has('admin'));
  protected readonly loaded = httpResource<PolicyAnswer>(() => '/api/policy');
  protected readonly problem = computed(() => errorText(this.loaded.error()));
  protected readonly policy = computed(() => (this.loaded.hasValue() ? this.loaded.value() : null));
  protected readonly sections = computed(() => {
    const policy = this.policy();
    return policy ? policySections(policy.values, policy.defaults, this.unit()) : [];
  });
  private readonly rows = computed(() => this.sections().flatMap((section) => section.rows));
  protected readonly form = computed<PolicyForm>(() => policyForm(this.rows(), this.unit()));
  /** What the form holds now, by control. */
  private readonly typed = signal<Readonly<Record<string, string | undefined>>>({});
  /** Controls that hold something else than the default. */
  protected readonly unlike = computed(() => {
    const typed = this.typed();
    return new Set(
      this.rows().flatMap(({ key, defaultText }) =>
        (typed[key] ?? defaultText) === defaultText ? [] : [key],
      ),
    );
  });
  protected readonly saving = new SaveState();

  constructor() {
    effect((onCleanup) => {
      const form = this.form();
      const following = form.valueChanges
        .pipe(
          startWith(null),
          map(() => form.getRawValue()),
        )
        .subscribe((values) => untracked(() => this.typed.set(values)));
      onCleanup(() => following.unsubscribe());
    });
  }

  hasUnsavedChanges(): boolean {
    return this.form().dirty;
  }

  protected warn(event: BeforeUnloadEvent): void {
    if (this.hasUnsavedChanges()) event.preventDefault();
  }

  protected restore(row: PolicyRow): void {
    const control = this.form().controls[row.key];
    control?.setValue(row.defaultText);
    control?.markAsDirty();
  }

  protected async save(): Promise<void> {
    const policy = this.policy();
    const form = this.form();
    form.markAllAsTouched();
    if (!policy || this.saving.busy()) return;
    if (form.invalid) {
      this.saving.say('Please correct the marked fields.');
      return focusFirstError(this.host.nativeElement);
    }
    const typed = form.getRawValue();
    const values = this.rows().map((row) => [row.path, this.valueOf(row, typed[row.key])] as const);
    await this.put(policy, withValues(policy.values, new Map(values)));
  }

  protected async restoreAll(): Promise<void> {
    const policy = this.policy();
    if (!policy) return;
    const isSure = await confirmed(this.dialog, {
      title: 'Restore every default?',
      text: 'All values become those the program came with, as a new version. Earlier versions stay in the list.',
      yes: 'Restore all',
      no: 'Keep ours',
    });
    if (isSure) await this.put(policy, policy.defaults);
  }

  protected again(): void {
    this.saving.clear();
    this.loaded.reload();
  }

  /** A restored default is the exact one, whatever rounding its text in °C had. */
  private valueOf(row: PolicyRow, text = row.text) {
    const defaults = this.policy()?.defaults;
    if (!defaults || text !== row.defaultText || text === row.text) return readValue(text, row, this.unit());
    const original = policySections(defaults, defaults, this.unit()).flatMap((section) => section.rows);
    return original.find(({ path }) => path === row.path)?.value ?? readValue(text, row, this.unit());
  }

  private async put(policy: PolicyAnswer, body: unknown): Promise<void> {
    const call = this.http.put<PolicyAnswer>('/api/policy', body, onVersion(policy));
    const saved = await this.saving.save(call, this.form(), controlNames(this.rows()));
    if (!saved) return focusFirstError(this.host.nativeElement);
    this.loaded.set(saved);
    this.snack.open(`Version ${saved.version} is in force.`, undefined, { duration: 4000 });
  }
}
