import { inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import type { CanDeactivateFn } from '@angular/router';
import { confirmed } from './confirm-dialog/confirm-dialog';

/** A page with a form that can be left with something unsaved in it. */
export interface HasUnsavedChanges {
  hasUnsavedChanges(): boolean;
}

/** Asks before what was typed gets lost. The page itself asks for `beforeunload`, when the browser is closed. */
export const unsavedGuard: CanDeactivateFn<HasUnsavedChanges> = (page) => {
  if (!page.hasUnsavedChanges()) return true;
  return confirmed(inject(MatDialog), {
    title: 'Leave without saving?',
    text: 'What you typed on this page is not saved yet and would be lost.',
    yes: 'Leave',
    no: 'Stay here',
  });
};
