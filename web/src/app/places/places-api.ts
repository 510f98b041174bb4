import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type {
  Box,
  BoxNew,
  Carrier,
  Counter,
  CounterNew,
  PostalCodeInfo,
  Species,
  SpeciesNew,
} from '@shared/contract';
import { onVersion } from '../ui/save-state';

/** The calls of counters, species and boxes. A change sends the version it was made on. */
@Injectable({ providedIn: 'root' })
export class PlacesApi {
  private readonly http = inject(HttpClient);

  counter(id: string): Observable<Counter> {
    return this.http.get<Counter>(`/api/counters/${id}`);
  }

  saveCounter(seen: Counter | null, body: CounterNew): Observable<Counter> {
    return this.save('/api/counters', seen, body);
  }

  oneSpecies(id: string): Observable<Species> {
    return this.http.get<Species>(`/api/species/${id}`);
  }

  saveSpecies(seen: Species | null, body: SpeciesNew): Observable<Species> {
    return this.save('/api/species', seen, body);
  }

  box(id: string): Observable<Box> {
    return this.http.get<Box>(`/api/boxes/${id}`);
  }

  saveBox(seen: Box | null, body: BoxNew): Observable<Box> {
    return this.save('/api/boxes', seen, body);
  }

  carriers(): Observable<Carrier[]> {
    return this.http.get<Carrier[]>('/api/carriers');
  }

  postalCode(code: string): Observable<PostalCodeInfo> {
    return this.http.get<PostalCodeInfo>(`/api/postal-codes/${encodeURIComponent(code)}`);
  }

  private save<T extends { id: number; version: number }>(
    path: string,
    seen: T | null,
    body: object,
  ): Observable<T> {
    return seen
      ? this.http.patch<T>(`${path}/${seen.id}`, body, onVersion(seen))
      : this.http.post<T>(path, body);
  }
}
