import { HttpClient } from '@angular/common/http';
import { effect, inject, Injectable, signal } from '@angular/core';
import type { TemperatureUnit } from '@shared/contract';
import { SessionStore } from './session/session-store';

const storageKey = 'dayberth.unit';

/** °F or °C: the account's choice, or this browser's for who is not signed in. */
@Injectable({ providedIn: 'root' })
export class UnitPreference {
  private readonly http = inject(HttpClient);
  private readonly session = inject(SessionStore);

  private readonly state = signal<TemperatureUnit>(localStorage.getItem(storageKey) === 'C' ? 'C' : 'F');
  readonly unit = this.state.asReadonly();

  constructor() {
    effect(() => {
      const me = this.session.me();
      if (me) this.state.set(me.temperatureUnit);
    });
  }

  /** Takes effect at once; kept in the account when signed in (a failure there only costs the memory of it). */
  choose(unit: TemperatureUnit): void {
    this.state.set(unit);
    localStorage.setItem(storageKey, unit);
    if (this.session.me())
      this.http.patch('/api/me', { temperatureUnit: unit }).subscribe({ error: () => undefined });
  }
}
