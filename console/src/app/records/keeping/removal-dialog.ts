import { Component, DestroyRef, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import { MAT_DIALOG_DATA, MatDialogModule, MatDialogRef } from '@angular/material/dialog';
import { RouterLink } from '@angular/router';
import { Problem, problemOf } from '../../api/problem';
import { RecordKeepingClient } from '../../api/record-keeping-client';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { ProblemNotice } from '../../ui/problem-notice';
import { Removal, goingOf, removedOf, stayingOf } from './removal-words';

/** What was deleted, in words, and whether the record set went along. */
export interface Removed {
  readonly words: string;
  readonly setGone: boolean;
}

/** Asks the service what deleting a revision would take along, shows it, and deletes only then. */
@Component({
  selector: 'tb-removal-dialog',
  imports: [LoadingState, MatDialogModule, ProblemNotice, RouterLink],
  templateUrl: './removal-dialog.html',
  styleUrl: './removal-dialog.scss',
})
export class RemovalDialog {
  private readonly client = inject(RecordKeepingClient);
  private readonly opened = inject<MatDialogRef<RemovalDialog, Removed>>(MatDialogRef);
  private readonly destroyRef = inject(DestroyRef);
  protected readonly removal = inject<Removal>(MAT_DIALOG_DATA);

  protected readonly deletion = load(() => this.client.readDeletion(this.removal.revision.id));
  protected readonly blocked = computed(() => (this.deletion.value()?.editions.length ?? 0) > 0);
  protected readonly heading = computed(() => {
    const { revision, recordSetName } = this.removal;
    const subject = `revision ${revision.number} of ${recordSetName}`;
    return this.blocked() ? `Revision ${revision.number} of ${recordSetName} cannot be deleted` : `Delete ${subject}?`;
  });
  protected readonly verb = computed(() => {
    const deletion = this.deletion.value();
    return deletion && `Delete ${removedOf(deletion)}`;
  });
  protected readonly going = computed(() => {
    const deletion = this.deletion.value();
    return deletion ? goingOf(deletion, this.removal) : [];
  });
  protected readonly staying = computed(() => {
    const deletion = this.deletion.value();
    return deletion ? stayingOf(deletion, this.removal) : [];
  });
  protected readonly underWay = signal(false);
  protected readonly refusal = signal<Problem | undefined>(undefined);

  protected cancel(): void {
    this.opened.close();
  }

  protected remove(): void {
    const deletion = this.deletion.value();
    if (deletion === undefined || this.underWay()) return;
    this.underWay.set(true);
    this.refusal.set(undefined);
    this.client
      .deleteRevision(this.removal.revision.id)
      .pipe(takeUntilDestroyed(this.destroyRef))
      .subscribe({
        next: () => this.opened.close({ words: removedOf(deletion), setGone: deletion.goesWithSet }),
        error: (error: unknown) => this.refuse(problemOf(error)),
      });
  }

  /** Something has changed since it was asked, such as a new edition: asks again. */
  private refuse(problem: Problem): void {
    this.underWay.set(false);
    this.refusal.set(problem);
    this.deletion.reload();
  }
}
