import { Component, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { choose, field, saidBeside, type } from '../testing/page';
import { ChoiceField } from './choice-field';
import { SelectField } from './select-field';
import { TextField } from './text-field';

@Component({
  imports: [ChoiceField, SelectField, TextField],
  template: `
    <tb-text-field label="Length" unit="m" hint="Recorded 6 to 18 m." [error]="error()" [(value)]="text" />
    <tb-text-field label="Words" [lines]="3" [(value)]="words" />
    <tb-select-field label="Hull" empty="Choose a hull" [options]="[{ value: 'grp', name: 'GRP' }]" [(value)]="hull" />
    <tb-choice-field label="Method" [choices]="choices" [(value)]="method" />
  `,
})
class Host {
  readonly error = signal<string | undefined>(undefined);
  readonly text = signal('12');
  readonly words = signal('');
  readonly hull = signal('');
  readonly method = signal<'a' | 'b'>('a');
  readonly choices = [
    { value: 'a' as const, name: 'First', explanation: 'The first.' },
    { value: 'b' as const, name: 'Second', explanation: 'The second.' },
  ];
}

async function show() {
  const fixture = TestBed.createComponent(Host);
  await fixture.whenStable();
  return { fixture, host: fixture.componentInstance };
}

describe('fields', () => {
  it('tie label, hint and error to the control', async () => {
    const { fixture, host } = await show();
    host.error.set('Enter a length.');
    await fixture.whenStable();
    expect(field('Length').getAttribute('aria-invalid')).toBe('true');
    expect(saidBeside('Length')).toBe('Recorded 6 to 18 m. Enter a length.');
  });

  it('give back what is typed, on one line or several', async () => {
    const { host } = await show();
    type('Length', '14.5');
    type('Words', 'two\nlines');
    expect([host.text(), host.words()]).toEqual(['14.5', 'two\nlines']);
  });

  it('give back what is chosen', async () => {
    const { host } = await show();
    choose('Hull', 'grp');
    field('Second').click();
    expect([host.hull(), host.method()]).toEqual(['grp', 'b']);
  });

  it('explain each choice', async () => {
    await show();
    expect(saidBeside('Second')).toBe('The second.');
  });
});
