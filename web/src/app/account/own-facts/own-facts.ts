import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  input,
  output,
  signal,
  untracked,
} from '@angular/core';
import { FormControl, NonNullableFormBuilder, ReactiveFormsModule, Validators } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatOption, MatSelect } from '@angular/material/select';
import type { Person, TemperatureUnit } from '@shared/contract';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { SaveState } from '../../ui/save-state';
import { zoneChoices } from '../../ui/us-zones';
import { AccountApi } from '../account-api';
import { SaveFoot } from '../save-foot/save-foot';

/** Name, phone, the clock one lives by and the unit of temperatures. */
@Component({
  selector: 'db-own-facts',
  imports: [
    FieldMessagePipe,
    MatFormFieldModule,
    MatInput,
    MatOption,
    MatRadioModule,
    MatSelect,
    ReactiveFormsModule,
    SaveFoot,
  ],
  templateUrl: './own-facts.html',
  styleUrl: '../section.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class OwnFacts {
  private readonly api = inject(AccountApi);

  readonly person = input.required<Person>();
  readonly saved = output<Person>();
  readonly again = output();

  readonly form = inject(NonNullableFormBuilder).group({
    name: ['', [Validators.required, Validators.maxLength(120)]],
    phone: ['', Validators.maxLength(30)],
    zone: ['', Validators.required],
    temperatureUnit: new FormControl<TemperatureUnit>('F', { nonNullable: true }),
  });
  protected readonly saving = new SaveState();
  protected readonly isDone = signal(false);
  /** The usual zones, and one's own where it is another. */
  protected readonly zones = computed(() => zoneChoices(this.person().zone));

  constructor() {
    effect(() => {
      const { name, phone, zone, temperatureUnit } = this.person();
      untracked(() => {
        if (this.form.pristine) this.form.reset({ name, phone: phone ?? '', zone, temperatureUnit });
      });
    });
  }

  protected async save(): Promise<void> {
    this.form.markAllAsTouched();
    if (this.form.invalid || this.saving.busy()) return;
    this.isDone.set(false);
    const { phone, ...rest } = this.form.getRawValue();
    const call = this.api.change(this.person(), { ...rest, phone: phone.trim() || null });
    const person = await this.saving.save(call, this.form);
    if (!person) return;
    this.form.markAsPristine();
    this.isDone.set(true);
    this.saved.emit(person);
  }

  protected reload(): void {
    this.saving.clear();
    this.form.markAsPristine();
    this.again.emit();
  }
}
