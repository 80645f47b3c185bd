import { HttpErrorResponse } from '@angular/common/http';
import { Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { Subject } from 'rxjs';
import { EntryForm } from './entry-form';

@Component({
  template: `
    <input aria-label="Name" [attr.aria-invalid]="form.errorOf('name') ? true : null" />
    <input aria-label="E-mail" [attr.aria-invalid]="form.errorOf('email') ? true : null" />
  `,
})
class Host {
  readonly form = new EntryForm<'name' | 'email'>();
}

function refusal(pointer: string): HttpErrorResponse {
  const error = {
    type: '',
    title: 'Taken',
    status: 409,
    code: 'email-taken',
    requestId: 'r1',
    errors: [{ detail: 'In use.', pointer }],
  };
  return new HttpErrorResponse({ status: 409, error });
}

async function open() {
  const fixture = TestBed.createComponent(Host);
  await fixture.whenStable();
  return { fixture, form: fixture.componentInstance.form };
}

describe('EntryForm', () => {
  it('moves the focus to the first field complained about', async () => {
    const { fixture, form } = await open();
    expect(form.accept({ name: undefined, email: 'Enter an address' })).toBe(false);
    await fixture.whenStable();
    expect(document.activeElement?.getAttribute('aria-label')).toBe('E-mail');
  });

  it('accepts when nothing is complained about, and forgets the last complaints', async () => {
    const { form } = await open();
    form.accept({ name: 'Enter a name' });
    expect(form.accept({ name: undefined })).toBe(true);
    expect(form.errorOf('name')).toBeUndefined();
  });

  it('shows the service’s complaint beside the field that its pointer names', async () => {
    const { fixture, form } = await open();
    const answer = new Subject<never>();
    form.send(answer, () => undefined);
    answer.error(refusal('#/email'));
    await fixture.whenStable();
    expect(form.errorOf('email')).toBe('In use.');
    expect(form.problem()?.code).toBe('email-taken');
    expect(document.activeElement?.getAttribute('aria-label')).toBe('E-mail');
  });

  it('sends once while an answer is awaited, and again afterwards', async () => {
    const { form } = await open();
    const answer = new Subject<string>();
    const answers: string[] = [];
    form.send(answer, (text) => answers.push(text));
    form.send(answer, (text) => answers.push(text));
    expect(form.underWay()).toBe(true);
    answer.next('done');
    answer.complete();
    expect(answers).toEqual(['done']);
    expect(form.underWay()).toBe(false);
  });
});
