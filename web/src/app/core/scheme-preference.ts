import { Injectable, signal } from '@angular/core';

export type Scheme = 'auto' | 'light' | 'dark';
const storageKey = 'dayberth.scheme';

/** Light, dark, or as the device says; kept in this browser. */
@Injectable({ providedIn: 'root' })
export class SchemePreference {
  private readonly state = signal<Scheme>(read());
  readonly scheme = this.state.asReadonly();

  constructor() {
    this.apply(this.state());
  }

  choose(scheme: Scheme): void {
    this.state.set(scheme);
    localStorage.setItem(storageKey, scheme);
    this.apply(scheme);
  }

  private apply(scheme: Scheme): void {
    const root = document.documentElement;
    if (scheme === 'auto') delete root.dataset['scheme'];
    else root.dataset['scheme'] = scheme;
  }
}

function read(): Scheme {
  const kept = localStorage.getItem(storageKey);
  return kept === 'light' || kept === 'dark' ? kept : 'auto';
}
