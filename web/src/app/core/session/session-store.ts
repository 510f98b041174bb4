import { HttpClient } from '@angular/common/http';
import { computed, inject, Injectable, signal } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import type { Role, SessionInfo, SignIn } from '@shared/contract';

/** Who is signed in. `ready()` asks the server once; everything after that is signals. */
@Injectable({ providedIn: 'root' })
export class SessionStore {
  private readonly http = inject(HttpClient);

  private readonly state = signal<SessionInfo | null>(null);
  private asking: Promise<SessionInfo> | null = null;

  readonly info = this.state.asReadonly();
  readonly me = computed(() => this.state()?.me ?? null);
  readonly roles = computed<readonly Role[]>(() => this.me()?.roles ?? []);
  readonly isDemo = computed(() => this.state()?.demo ?? false);
  readonly circleName = computed(() => this.state()?.circleName ?? '');
  readonly circleZone = computed(() => this.state()?.circleZone ?? 'America/Chicago');

  has(...roles: readonly Role[]): boolean {
    return roles.some((role) => this.roles().includes(role));
  }

  /** The session, asked for once; a failed question is asked again the next time. */
  async ready(): Promise<SessionInfo> {
    const known = this.state();
    if (known) return known;
    this.asking ??= this.refresh().finally(() => (this.asking = null));
    return this.asking;
  }

  async refresh(): Promise<SessionInfo> {
    return this.keep(await firstValueFrom(this.http.get<SessionInfo>('/api/session')));
  }

  async signIn(body: SignIn): Promise<SessionInfo> {
    return this.keep(await firstValueFrom(this.http.post<SessionInfo>('/api/session', body)));
  }

  async signOut(): Promise<void> {
    await firstValueFrom(this.http.delete('/api/session'));
    this.forget();
    await this.refresh();
  }

  /** The server does not know us any more: nobody is signed in. */
  forget(): void {
    this.state.update((info) => (info ? { ...info, me: null } : info));
  }

  private keep(info: SessionInfo): SessionInfo {
    this.state.set(info);
    return info;
  }
}
