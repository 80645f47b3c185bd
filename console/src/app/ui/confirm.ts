import { Injectable, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Observable, map } from 'rxjs';
import { ConfirmDialog } from './confirm-dialog';
import { NoteDialog } from './note-dialog';

export interface ConfirmRequest {
  /** The question, with the thing's name: `Withdraw edition 4 of Refit labour?` */
  readonly heading: string;
  /** What will happen and to whom, a sentence each. */
  readonly consequences: readonly string[];
  /** The verb on the button. */
  readonly verb: string;
  /** Whether it cannot be taken back. */
  readonly lasting?: boolean;
}

export interface NoteRequest extends ConfirmRequest {
  readonly noteLabel: string;
  readonly noteHint?: string;
}

/** Asks before something that matters. */
@Injectable({ providedIn: 'root' })
export class Confirm {
  private readonly dialog = inject(MatDialog);

  ask(request: ConfirmRequest): Observable<boolean> {
    const opened = this.dialog.open<ConfirmDialog, ConfirmRequest, boolean>(ConfirmDialog, {
      data: request,
      ariaLabelledBy: 'tb-confirm-heading',
    });
    return opened.afterClosed().pipe(map((answer) => answer === true));
  }

  /** Emits the note, or undefined when the person thought better of it. */
  askForNote(request: NoteRequest): Observable<string | undefined> {
    const opened = this.dialog.open<NoteDialog, NoteRequest, string>(NoteDialog, {
      data: request,
      ariaLabelledBy: 'tb-confirm-heading',
      autoFocus: 'textarea',
    });
    return opened.afterClosed();
  }
}
