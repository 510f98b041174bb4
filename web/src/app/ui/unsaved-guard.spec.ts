import { TestBed } from '@angular/core/testing';
import { MatDialog } from '@angular/material/dialog';
import type { ActivatedRouteSnapshot, RouterStateSnapshot } from '@angular/router';
import { of } from 'rxjs';
import { unsavedGuard } from './unsaved-guard';

const nowhere = {} as ActivatedRouteSnapshot;
const there = {} as RouterStateSnapshot;

describe('leaving a page with a form', () => {
  const leave = (hasUnsavedChanges: boolean, answer: boolean | undefined) => {
    const open = jest.fn(() => ({ afterClosed: () => of(answer) }));
    TestBed.configureTestingModule({ providers: [{ provide: MatDialog, useValue: { open } }] });
    const page = { hasUnsavedChanges: () => hasUnsavedChanges };
    const result = TestBed.runInInjectionContext(() => unsavedGuard(page, nowhere, there, there));
    return { result, open };
  };

  it('asks nothing when everything is saved', () => {
    const { result, open } = leave(false, undefined);
    expect(result).toBe(true);
    expect(open).not.toHaveBeenCalled();
  });

  it.each([
    ['stays when the question is closed without an answer', undefined, false],
    ['stays when that is chosen', false, false],
    ['leaves when that is chosen', true, true],
  ])('%s', async (_rule, answer, expected) => {
    expect(await leave(true, answer).result).toBe(expected);
  });
});
