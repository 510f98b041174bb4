import { inject } from '@angular/core';
import { MatIconRegistry } from '@angular/material/icon';
import { DomSanitizer } from '@angular/platform-browser';
import { iconLiterals } from './icons';

/** Makes our icons known to `<mat-icon svgIcon="…">`; call in an injection context, once. */
export function registerIcons(): void {
  const registry = inject(MatIconRegistry);
  const sanitizer = inject(DomSanitizer);
  for (const [name, svg] of iconLiterals)
    registry.addSvgIconLiteral(name, sanitizer.bypassSecurityTrustHtml(svg));
}
