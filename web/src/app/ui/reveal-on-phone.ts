/**
 * Brings an element under the top bar where a page is one narrow column, so that what a tap brought about is seen;
 * nothing on a wider screen, where it is in view anyway.
 */
export function revealOnPhone(element: HTMLElement | undefined): void {
  if (globalThis.matchMedia?.('(max-width: 760px)').matches) element?.scrollIntoView({ block: 'start' });
}
