import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type {
  Booking,
  BreederSummary,
  DaysAnswer,
  HistoryEntry,
  Parcel,
  ParcelNew,
  ParcelPatch,
  Person,
} from '@shared/contract';
import { onVersion } from '../ui/save-state';

/** The calls of the parcel pages. Every change of a parcel sends the version it was made on. */
@Injectable({ providedIn: 'root' })
export class ParcelsApi {
  private readonly http = inject(HttpClient);

  /** `state`: names joined with commas; empty for all. */
  list(filter: { q: string; state: string }): Observable<Parcel[]> {
    const params = Object.fromEntries(Object.entries(filter).filter(([, value]) => value !== ''));
    return this.http.get<Parcel[]>('/api/parcels', { params });
  }

  get(id: number): Observable<Parcel> {
    return this.http.get<Parcel>(`/api/parcels/${id}`);
  }

  days(id: number): Observable<DaysAnswer> {
    return this.http.get<DaysAnswer>(`/api/parcels/${id}/days`);
  }

  /** One day with its box trace. */
  trace(id: number, date: string): Observable<DaysAnswer> {
    return this.http.get<DaysAnswer>(`/api/parcels/${id}/days`, {
      params: { from: date, days: 1, trace: 1 },
    });
  }

  history(id: number): Observable<HistoryEntry[]> {
    return this.http.get<HistoryEntry[]>(`/api/parcels/${id}/history`);
  }

  create(body: ParcelNew): Observable<Parcel> {
    return this.http.post<Parcel>('/api/parcels', body);
  }

  change(parcel: Parcel, patch: ParcelPatch): Observable<Parcel> {
    return this.http.patch<Parcel>(`/api/parcels/${parcel.id}`, patch, onVersion(parcel));
  }

  book(parcel: Parcel, booking: Booking): Observable<Parcel> {
    return this.http.put<Parcel>(`/api/parcels/${parcel.id}/booking`, booking, onVersion(parcel));
  }

  unbook(parcel: Parcel): Observable<Parcel> {
    return this.http.delete<Parcel>(`/api/parcels/${parcel.id}/booking`, onVersion(parcel));
  }

  /** Oneself, with the counter where one's parcels are dropped off. */
  me(): Observable<Person> {
    return this.http.get<Person>('/api/me');
  }

  breeders(): Observable<BreederSummary[]> {
    return this.http.get<BreederSummary[]>('/api/breeders');
  }
}
