import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { takeUntilDestroyed, toObservable, toSignal } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioModule } from '@angular/material/radio';
import { MatOption, MatSelect } from '@angular/material/select';
import { catchError, debounceTime, map, of, startWith, switchMap } from 'rxjs';
import type { Counter, PostalCodeInfo } from '@shared/contract';
import { toProblem } from '../../core/http/problem';
import { FieldMessagePipe } from '../../core/http/field-message-pipe';
import { CircleLists } from '../circle-lists';

type Found = { readonly info: PostalCodeInfo } | { readonly trouble: string };

/** The hold counter: by the buyer's ZIP code among the nearest, or from the list of all. */
@Component({
  selector: 'db-hold-counter-field',
  imports: [
    FieldMessagePipe,
    MatFormFieldModule,
    MatInput,
    MatOption,
    MatRadioModule,
    MatSelect,
    ReactiveFormsModule,
  ],
  templateUrl: './hold-counter-field.html',
  styleUrl: './hold-counter-field.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class HoldCounterField {
  private readonly lists = inject(CircleLists);

  readonly control = input.required<FormControl<number | null>>();
  /** All counters that hold for pickup. */
  readonly counters = input.required<readonly Counter[]>();
  /** A ZIP code was looked up and is known. */
  readonly postalCodeFound = output<PostalCodeInfo>();

  protected readonly zip = new FormControl('', { nonNullable: true });
  protected readonly found = signal<Found | null>(null);
  protected readonly nearest = computed(() => {
    const found = this.found();
    return found && 'info' in found ? found.info.nearest.slice(0, 3) : [];
  });
  protected readonly place = computed(() => {
    const found = this.found();
    return found && 'info' in found ? `${found.info.city}, ${found.info.state}` : '';
  });
  protected readonly trouble = computed(() => {
    const found = this.found();
    return found && 'trouble' in found ? found.trouble : '';
  });
  protected readonly state = toSignal(
    toObservable(this.control).pipe(
      switchMap((control) =>
        control.events.pipe(
          startWith(null),
          map(() => ({ value: control.value, errors: control.touched ? control.errors : null })),
        ),
      ),
    ),
    { initialValue: { value: null, errors: null } },
  );
  /** What the ZIP code chose by itself; a choice of the person's own is never changed by typing a ZIP. */
  private chosenByZip: number | null = null;

  constructor() {
    this.zip.valueChanges
      .pipe(
        debounceTime(200),
        switchMap((text) => this.look(text.trim())),
        takeUntilDestroyed(inject(DestroyRef)),
      )
      .subscribe((found) => this.take(found));
  }

  private look(postalCode: string) {
    if (!/^\d{5}$/.test(postalCode)) return of(null);
    return this.lists.lookUp(postalCode).pipe(
      map((info): Found => ({ info })),
      catchError((thrown: unknown) => {
        const problem = toProblem(thrown);
        const trouble =
          problem.code === 'not-found' ? 'That ZIP code is not known.' : (problem.detail ?? problem.title);
        return of<Found>({ trouble });
      }),
    );
  }

  private take(found: Found | null): void {
    this.found.set(found);
    if (!found || !('info' in found)) return;
    this.postalCodeFound.emit(found.info);
    const control = this.control();
    const closest = found.info.nearest[0]?.counterId ?? null;
    if (closest === null || (control.value !== null && control.value !== this.chosenByZip)) return;
    this.chosenByZip = closest;
    control.setValue(closest);
    control.markAsDirty();
  }
}
