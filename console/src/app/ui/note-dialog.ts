import { Component, inject, signal } from '@angular/core';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import type { NoteRequest } from './confirm';
import { Field, FieldInput } from './field';

const LONGEST_NOTE = 2000;

/** A confirmation that must be given a reason. */
@Component({
  selector: 'tb-note-dialog',
  imports: [MatDialogModule, Field, FieldInput],
  templateUrl: './note-dialog.html',
  styleUrl: './confirm-dialog.scss',
})
export class NoteDialog {
  private readonly opened = inject<MatDialogRef<NoteDialog, string>>(MatDialogRef);
  protected readonly request = inject<NoteRequest>(MAT_DIALOG_DATA);
  protected readonly error = signal<string | undefined>(undefined);

  protected answer(note: string): void {
    const complaint = complaintAbout(note);
    this.error.set(complaint);
    if (complaint === undefined) this.opened.close(note.trim());
  }

  protected cancel(): void {
    this.opened.close();
  }
}

function complaintAbout(note: string): string | undefined {
  if (note.trim() === '') return 'Write a sentence: it is kept in the journal and shown to the people concerned.';
  if (note.length > LONGEST_NOTE) return `Shorten the note to ${LONGEST_NOTE} characters; it has ${note.length}.`;
  return undefined;
}
