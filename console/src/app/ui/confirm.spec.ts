import { ApplicationRef } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { firstValueFrom } from 'rxjs';
import { Confirm } from './confirm';

describe('Confirm', () => {
  const request = {
    heading: 'Withdraw edition 4 of Refit labour?',
    consequences: ['Two partners get no estimates for refit labour until another edition is in force.'],
    verb: 'Withdraw',
    lasting: true,
  };

  const stable = (): Promise<void> => TestBed.inject(ApplicationRef).whenStable();
  const dialog = (): HTMLElement => document.querySelector('[role="dialog"]') as HTMLElement;

  async function press(name: string): Promise<void> {
    const found = [...dialog().querySelectorAll('button')].find((button) => button.textContent?.trim() === name);
    found?.click();
    await stable();
  }

  it('names what will happen and to whom', async () => {
    TestBed.inject(Confirm).ask(request).subscribe();
    await stable();
    expect(dialog().textContent).toContain('Two partners get no estimates');
    expect(document.getElementById(dialog().getAttribute('aria-labelledby') ?? '')?.textContent).toBe(request.heading);
  });

  it.each([
    ['Withdraw', true],
    ['Cancel', false],
  ])('answers %s with %s', async (name, expected) => {
    const answer = firstValueFrom(TestBed.inject(Confirm).ask(request));
    await stable();
    await press(name);
    expect(await answer).toBe(expected);
  });

  it('does not take an empty note, and says why', async () => {
    const note = firstValueFrom(TestBed.inject(Confirm).askForNote({ ...request, noteLabel: 'Why' }));
    await stable();
    await press('Withdraw');
    expect(dialog().querySelector('textarea')?.getAttribute('aria-invalid')).toBe('true');
    (dialog().querySelector('textarea') as HTMLTextAreaElement).value = '  The new crane lifts faster.  ';
    await press('Withdraw');
    expect(await note).toBe('The new crane lifts faster.');
  });

  it('answers undefined when the person thinks better of it', async () => {
    const note = firstValueFrom(TestBed.inject(Confirm).askForNote({ ...request, noteLabel: 'Why' }));
    await stable();
    await press('Cancel');
    expect(await note).toBeUndefined();
  });
});
