import { inject, Injectable } from '@angular/core';
import { Title } from '@angular/platform-browser';
import { TitleStrategy, type RouterStateSnapshot } from '@angular/router';

/** `Parcels · Dayberth` from the route's title; a page that knows better calls `set` once it has loaded. */
@Injectable({ providedIn: 'root' })
export class PageTitles extends TitleStrategy {
  private readonly title = inject(Title);

  override updateTitle(snapshot: RouterStateSnapshot): void {
    this.set(this.buildTitle(snapshot));
  }

  set(text: string | undefined): void {
    this.title.setTitle(text ? `${text} · Dayberth` : 'Dayberth');
  }
}
