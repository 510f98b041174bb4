import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { forkJoin, map, type Observable } from 'rxjs';
import type {
  Blackout,
  BlackoutList,
  BlackoutNew,
  BlackoutPreview,
  Carrier,
  Counter,
} from '@shared/contract';
import { onVersion } from '../ui/save-state';

/** What a blackout's scope can name. */
export interface ScopeNames {
  readonly carriers: readonly Carrier[];
  readonly counters: readonly Counter[];
}

/** The calls of the calendar. Every change of a blackout sends the version it was made on. */
@Injectable({ providedIn: 'root' })
export class BlackoutsApi {
  private readonly http = inject(HttpClient);

  /** The blackouts, and the days they cover from one date to another; both ends count. */
  list(from: string, to: string): Observable<BlackoutList> {
    return this.http.get<BlackoutList>('/api/blackouts', { params: { from, to } });
  }

  /** One blackout as it is now; undefined when it is gone. */
  find(id: number): Observable<Blackout | undefined> {
    return this.http
      .get<BlackoutList>('/api/blackouts')
      .pipe(map(({ blackouts }) => blackouts.find((one) => one.id === id)));
  }

  names(): Observable<ScopeNames> {
    return forkJoin({
      carriers: this.http.get<Carrier[]>('/api/carriers'),
      counters: this.http.get<Counter[]>('/api/counters'),
    });
  }

  /** What saving would move; `null` for taking the blackout away. Nothing is saved. */
  preview(blackout: BlackoutNew | null, replaces?: number): Observable<BlackoutPreview> {
    return this.http.post<BlackoutPreview>('/api/blackouts/preview', { blackout, replaces });
  }

  add(body: BlackoutNew): Observable<Blackout> {
    return this.http.post<Blackout>('/api/blackouts', body);
  }

  change(seen: Blackout, body: BlackoutNew): Observable<Blackout> {
    return this.http.patch<Blackout>(`/api/blackouts/${seen.id}`, body, onVersion(seen));
  }

  remove(seen: Blackout): Observable<unknown> {
    return this.http.delete(`/api/blackouts/${seen.id}`, onVersion(seen));
  }
}
