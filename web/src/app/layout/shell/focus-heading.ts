import { afterNextRender, DestroyRef, inject, Injector } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { NavigationEnd, Router } from '@angular/router';
import { filter } from 'rxjs';

/**
 * After each navigation to another path the focus goes to the new page's heading, so that a screen reader says where
 * one is and the next Tab starts there. Call in an injection context; the first page keeps the browser's own focus.
 */
export function focusHeadingOnNavigation(): void {
  const router = inject(Router);
  const injector = inject(Injector);
  let path = pathOf(router.url);
  router.events
    .pipe(
      filter((event) => event instanceof NavigationEnd),
      takeUntilDestroyed(inject(DestroyRef)),
    )
    .subscribe((event) => {
      const next = pathOf(event.urlAfterRedirects);
      if (next === path) return;
      path = next;
      afterNextRender({ read: () => focusHeading() }, { injector });
    });
}

function focusHeading(): void {
  const target =
    document.querySelector<HTMLElement>('main h1') ?? document.querySelector<HTMLElement>('main');
  target?.setAttribute('tabindex', '-1');
  target?.focus({ preventScroll: true });
}

const pathOf = (url: string): string => url.split(/[?#]/, 1)[0] ?? '';
