import { Component, inject, signal } from '@angular/core';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { Edition, Withdrawal } from '../../api/contract';
import { Field, FieldInput } from '../../ui/field';
import { TextField } from '../fields/text-field';
import { withdrawalConsequences } from './edition-actions';

const LONGEST_NOTE = 2000;

/** Asks why an edition is withdrawn, and until when calls that pinned it are still answered. */
@Component({
  selector: 'tb-withdraw-dialog',
  imports: [Field, FieldInput, MatDialogModule, TextField],
  template: `
    <h2 mat-dialog-title>Withdraw edition {{ edition.number }} of {{ edition.estimatorName }}?</h2>
    <mat-dialog-content>
      <ul>
        @for (consequence of consequences; track consequence) {
          <li>{{ consequence }}</li>
        }
      </ul>
      <div class="tb-form">
        <tb-text-field
          label="Why it is withdrawn"
          hint="Partners and the journal are told."
          [lines]="3"
          [error]="noteError()"
          [(value)]="note"
        />
        <tb-field
          label="Answer pinned calls until (optional)"
          hint="The end of this day. Left empty, they are refused at once."
          [error]="dayError()"
        >
          <input tbInput #day type="date" [value]="sunset()" (input)="sunset.set(day.value)" />
        </tb-field>
      </div>
    </mat-dialog-content>
    <mat-dialog-actions>
      <button type="button" class="tb-plain-button" (click)="cancel()">Cancel</button>
      <button type="button" class="tb-danger-button" (click)="withdraw()">Withdraw</button>
    </mat-dialog-actions>
  `,
  styleUrl: '../../ui/confirm-dialog.scss',
})
export class WithdrawDialog {
  private readonly opened = inject<MatDialogRef<WithdrawDialog, Withdrawal>>(MatDialogRef);
  protected readonly edition = inject<Edition>(MAT_DIALOG_DATA);

  protected readonly consequences = withdrawalConsequences(this.edition);
  protected readonly note = signal('');
  protected readonly sunset = signal('');
  protected readonly noteError = signal<string | undefined>(undefined);
  protected readonly dayError = signal<string | undefined>(undefined);

  protected withdraw(): void {
    const note = this.note().trim();
    const until = this.sunset() === '' ? null : new Date(`${this.sunset()}T23:59:59`);
    this.noteError.set(noteComplaint(note));
    this.dayError.set(until !== null && until.getTime() < Date.now() ? 'Choose today or a later day.' : undefined);
    if (this.noteError() !== undefined || this.dayError() !== undefined) return;
    this.opened.close({ note, ...(until ? { sunsetAt: until.toISOString() } : {}) });
  }

  protected cancel(): void {
    this.opened.close();
  }
}

function noteComplaint(note: string): string | undefined {
  if (note === '') return 'Say why: partners and the journal are told.';
  return note.length > LONGEST_NOTE
    ? `Shorten the note to ${LONGEST_NOTE} characters; it has ${note.length}.`
    : undefined;
}
