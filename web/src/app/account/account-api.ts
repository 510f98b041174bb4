import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import type { Observable } from 'rxjs';
import type { Availability, CalendarFeed, MePatch, PasswordChange, Person } from '@shared/contract';
import { onVersion } from '../ui/save-state';

/** What a person reads and changes of themselves. */
@Injectable({ providedIn: 'root' })
export class AccountApi {
  private readonly http = inject(HttpClient);

  me(): Observable<Person> {
    return this.http.get<Person>('/api/me');
  }

  change(person: Person, patch: MePatch): Observable<Person> {
    return this.http.patch<Person>('/api/me', patch, onVersion(person));
  }

  changePassword(body: PasswordChange): Observable<unknown> {
    return this.http.put('/api/me/password', body);
  }

  availability(): Observable<Availability> {
    return this.http.get<Availability>('/api/me/availability');
  }

  /** Replaces all days at once. */
  setAvailability(availability: Availability): Observable<Availability> {
    return this.http.put<Availability>('/api/me/availability', availability);
  }

  feed(): Observable<CalendarFeed> {
    return this.http.get<CalendarFeed>('/api/me/calendar-feed');
  }

  /** A new secret address; the old one ends. */
  newFeed(): Observable<CalendarFeed> {
    return this.http.post<CalendarFeed>('/api/me/calendar-feed', {});
  }
}
