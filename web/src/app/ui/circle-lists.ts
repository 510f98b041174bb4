import { HttpClient } from '@angular/common/http';
import { computed, inject, Injectable } from '@angular/core';
import { rxResource } from '@angular/core/rxjs-interop';
import { forkJoin, type Observable } from 'rxjs';
import type { Box, Counter, PostalCodeInfo, Species } from '@shared/contract';
import { errorText } from './call-state';

/** What the circle ships and between which counters. Provide it at a page, so that each visit reads it afresh. */
@Injectable()
export class CircleLists {
  private readonly http = inject(HttpClient);

  private readonly all = rxResource({
    stream: () =>
      forkJoin({
        species: this.http.get<Species[]>('/api/species'),
        boxes: this.http.get<Box[]>('/api/boxes'),
        counters: this.http.get<Counter[]>('/api/counters'),
      }),
  });
  private readonly known = computed(() =>
    this.all.hasValue() ? this.all.value() : { species: [], boxes: [], counters: [] },
  );
  readonly isReady = computed(() => this.all.hasValue());
  readonly problem = computed(() => errorText(this.all.error()));
  /** Those in use, by name. */
  readonly species = computed(() => this.known().species.filter((one) => one.active));
  readonly boxes = computed(() =>
    this.known()
      .boxes.filter((one) => one.active)
      .sort((a, b) => a.volumeL - b.volumeL),
  );
  readonly holdCounters = computed(() =>
    byPlace(this.known().counters.filter((one) => one.active && one.canHold)),
  );
  readonly dropOffCounters = computed(() =>
    byPlace(this.known().counters.filter((one) => one.active && one.canDropOff)),
  );

  reload(): void {
    this.all.reload();
  }

  /** Where a ZIP code is, with the nearest hold counters. */
  lookUp(postalCode: string): Observable<PostalCodeInfo> {
    return this.http.get<PostalCodeInfo>(`/api/postal-codes/${encodeURIComponent(postalCode)}`);
  }
}

const byPlace = (counters: readonly Counter[]): Counter[] =>
  counters.toSorted((a, b) => a.state.localeCompare(b.state) || a.name.localeCompare(b.name));
