import { HttpErrorResponse } from '@angular/common/http';
import { FormArray, FormControl, FormGroup, Validators } from '@angular/forms';
import type { Problem } from '@shared/contract';
import { applyProblem, fieldMessage, ProblemError, toProblem } from './problem';

const badInput = (errors: Problem['errors']): Problem => ({
  type: 'urn:dayberth:problem:bad-input',
  title: 'Some fields need another look',
  status: 400,
  detail: 'Please correct the marked fields.',
  code: 'bad-input',
  errors,
});

const parcelForm = () =>
  new FormGroup({
    buyer: new FormGroup({ email: new FormControl('x', Validators.minLength(2)) }),
    contents: new FormArray([
      new FormGroup({ massG: new FormControl(0) }),
      new FormGroup({ massG: new FormControl(0) }),
    ]),
    door: new FormControl<string | null>(null),
  });

describe('applyProblem', () => {
  it('marks each field by its path, lists included', () => {
    const form = parcelForm();
    applyProblem(form, badInput([{ path: 'contents.1.massG', message: 'Enter the mass of one animal.' }]));
    expect(form.get('contents.1.massG')?.errors).toEqual({ server: 'Enter the mass of one animal.' });
    expect(form.get('contents.1.massG')?.touched).toBe(true);
    expect(form.get('contents.0.massG')?.errors).toBeNull();
  });
  it('keeps what the form itself had to say', () => {
    const form = parcelForm();
    applyProblem(form, badInput([{ path: 'buyer.email', message: 'Taken.' }]));
    expect(Object.keys(form.get('buyer.email')?.errors ?? {}).toSorted()).toEqual(['minlength', 'server']);
  });
  it('is forgotten at the next edit', () => {
    const form = parcelForm();
    applyProblem(form, badInput([{ path: 'contents.0.massG', message: 'No.' }]));
    form.get('contents.0.massG')?.setValue(5);
    expect(form.get('contents.0.massG')?.errors).toBeNull();
  });
  it('gives a complaint about a part of an undivided control to that control', () => {
    const form = parcelForm();
    applyProblem(form, badInput([{ path: 'door.street', message: 'The street is missing.' }]));
    expect(form.get('door')?.errors).toEqual({ server: 'The street is missing.' });
  });
  it('writes out what no control takes', () => {
    const message = applyProblem(parcelForm(), badInput([{ path: '', message: 'Nothing to change.' }]));
    expect(message).toBe('Please correct the marked fields. Nothing to change.');
  });
  it('finds a renamed control', () => {
    const form = parcelForm();
    applyProblem(form, badInput([{ path: 'address', message: 'Missing.' }]), { address: 'door' });
    expect(form.get('door')?.errors).toEqual({ server: 'Missing.' });
  });
});

describe('toProblem', () => {
  it('passes the server document through', () => {
    const body = badInput([]);
    expect(toProblem(new HttpErrorResponse({ status: 400, error: body }))).toEqual(body);
    expect(toProblem(new ProblemError(body))).toBe(body);
  });
  it('names a dead connection', () => {
    expect(toProblem(new HttpErrorResponse({ status: 0 }))).toMatchObject({ code: 'offline', status: 0 });
  });
  it('does not show strange bodies', () => {
    expect(toProblem(new HttpErrorResponse({ status: 502, error: '<html>' }))).toMatchObject({
      code: 'internal',
      errors: [],
    });
  });
});

describe('fieldMessage', () => {
  it('prefers what the server said', () => {
    expect(fieldMessage({ required: true, server: 'Taken.' })).toBe('Taken.');
  });
  it('says nothing about a control without errors', () => {
    expect(fieldMessage(null)).toBe('');
  });
});
