import { HttpClient } from '@angular/common/http';
import { inject, Injectable } from '@angular/core';
import { firstValueFrom } from 'rxjs';
import type { AccountLink, DemoInfo } from '@shared/contract';

/** Password links and the demo's accounts. */
@Injectable({ providedIn: 'root' })
export class SessionApi {
  private readonly http = inject(HttpClient);

  /** Sends a link when the address is known; answers the same either way. */
  askForReset(email: string): Promise<unknown> {
    return firstValueFrom(this.http.post('/api/password-resets', { email }));
  }

  accountLink(token: string): Promise<AccountLink> {
    return firstValueFrom(this.http.get<AccountLink>(`/api/account-links/${encodeURIComponent(token)}`));
  }

  /** Sets the password and ends the link. */
  async useAccountLink(token: string, password: string): Promise<void> {
    await firstValueFrom(this.http.post(`/api/account-links/${encodeURIComponent(token)}`, { password }));
  }

  demo(): Promise<DemoInfo> {
    return firstValueFrom(this.http.get<DemoInfo>('/api/demo'));
  }
}
