import { FormControl, FormGroup } from '@angular/forms';
import { of, throwError } from 'rxjs';
import type { Problem } from '@shared/contract';
import { ProblemError } from '../core/http/problem';
import { onVersion, SaveState } from './save-state';

const problem = (code: string, errors: Problem['errors'] = []): Problem => ({
  type: `urn:dayberth:problem:${code}`,
  title: 'No',
  status: 412,
  detail: 'Somebody changed this.',
  code,
  errors,
});
const refused = (code: string, errors: Problem['errors'] = []) =>
  throwError(() => new ProblemError(problem(code, errors)));

describe('saving a form', () => {
  let form: FormGroup<{ title: FormControl<string | null> }>;
  let saving: SaveState;
  beforeEach(() => {
    form = new FormGroup({ title: new FormControl('') });
    saving = new SaveState();
  });

  it('answers what was saved', async () => {
    expect(await saving.save(of(7), form)).toBe(7);
    expect(saving.message()).toBeNull();
  });

  it('knows that somebody else saved in between, until the present state is loaded', async () => {
    expect(await saving.save(refused('stale'), form)).toBeNull();
    expect(saving.isStale()).toBe(true);
    expect(saving.message()).toBe('Somebody changed this.');
    saving.clear();
    expect([saving.isStale(), saving.message()]).toEqual([false, null]);
  });

  it('puts complaints onto their fields, renamed where the form says otherwise', async () => {
    const errors = [{ path: 'blackout.title', message: 'The title is missing.' }];
    await saving.save(refused('bad-input', errors), form, { 'blackout.title': 'title' });
    expect(saving.isStale()).toBe(false);
    expect(form.controls.title.errors).toEqual({ server: 'The title is missing.' });
  });
});

describe('the version of an edit', () => {
  it('goes along as a strong entity tag', () => {
    expect(onVersion({ version: 4 }).headers.get('If-Match')).toBe('"4"');
  });
});
