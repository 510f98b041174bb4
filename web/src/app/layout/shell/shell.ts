import { BreakpointObserver } from '@angular/cdk/layout';
import { ChangeDetectionStrategy, Component, computed, inject, signal } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatIconButton } from '@angular/material/button';
import { MatIcon } from '@angular/material/icon';
import { Router, RouterLink, RouterLinkActive, RouterOutlet } from '@angular/router';
import { map } from 'rxjs';
import { SessionStore } from '../../core/session/session-store';
import { SchemePreference, type Scheme } from '../../core/scheme-preference';
import { BrandMark } from '../../ui/brand-mark/brand-mark';
import { focusHeadingOnNavigation } from './focus-heading';
import { placesFor } from './places-for';

/** The frame of every page of who is signed in: navigation at the side, on a phone behind the menu at the top. */
@Component({
  selector: 'db-shell',
  imports: [BrandMark, MatIcon, MatIconButton, RouterLink, RouterLinkActive, RouterOutlet],
  templateUrl: './shell.html',
  styleUrl: './shell.scss',
  host: { '(keydown.escape)': 'isMenuOpen.set(false)' },
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Shell {
  private readonly session = inject(SessionStore);
  private readonly router = inject(Router);
  private readonly schemes = inject(SchemePreference);

  protected readonly isPhone = toSignal(
    inject(BreakpointObserver)
      .observe('(max-width: 760px)')
      .pipe(map((state) => state.matches)),
    { initialValue: false },
  );
  protected readonly isMenuOpen = signal(false);
  protected readonly me = this.session.me;
  protected readonly isDemo = this.session.isDemo;
  protected readonly circleName = this.session.circleName;
  protected readonly places = computed(() => placesFor(this.session.roles()));
  protected readonly scheme = this.schemes.scheme;
  protected readonly schemeIcon = computed(() => schemeLooks[this.scheme()].icon);
  protected readonly schemeText = computed(() => schemeLooks[this.scheme()].text);

  constructor() {
    focusHeadingOnNavigation();
  }

  protected skipToMain(event: Event, main: HTMLElement): void {
    event.preventDefault();
    main.focus();
    main.scrollIntoView();
  }

  protected nextScheme(): void {
    this.schemes.choose(schemeLooks[this.scheme()].next);
  }

  protected async signOut(): Promise<void> {
    await this.session.signOut();
    await this.router.navigateByUrl('/sign-in');
  }
}

const schemeLooks: Readonly<Record<Scheme, { icon: string; text: string; next: Scheme }>> = {
  auto: { icon: 'half', text: 'Colors: as the device', next: 'light' },
  light: { icon: 'sun', text: 'Colors: light', next: 'dark' },
  dark: { icon: 'moon', text: 'Colors: dark', next: 'auto' },
};
