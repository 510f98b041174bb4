import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { DaysAnswer, RouteCheck } from '@shared/contract';

/** The question without a parcel. */
@Injectable({ providedIn: 'root' })
export class RouteCheckApi {
  private readonly http = inject(HttpClient);

  ask(question: RouteCheck): Observable<DaysAnswer> {
    return this.http.post<DaysAnswer>('/api/route-checks', question);
  }
}
