import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { Arrival, ArrivalList, MorningsBody, ReportBody } from '@shared/contract';

/** The buyer's calls: by the secret of the link, signed in or not. */
@Injectable({ providedIn: 'root' })
export class ArrivalsApi {
  private readonly http = inject(HttpClient);

  own(): Observable<ArrivalList> {
    return this.http.get<ArrivalList>('/api/arrivals');
  }

  get(token: string): Observable<Arrival> {
    return this.http.get<Arrival>(`/api/arrivals/${encodeURIComponent(token)}`);
  }

  sayMornings(token: string, mornings: MorningsBody['mornings']): Observable<Arrival> {
    return this.http.put<Arrival>(`/api/arrivals/${encodeURIComponent(token)}/mornings`, { mornings });
  }

  report(token: string, report: ReportBody): Observable<Arrival> {
    return this.http.post<Arrival>(`/api/arrivals/${encodeURIComponent(token)}/report`, report);
  }
}
