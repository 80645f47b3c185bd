import { DOCUMENT } from '@angular/common';
import { Injectable, inject } from '@angular/core';
import { MatDialog } from '@angular/material/dialog';
import { Router } from '@angular/router';
import type { RevisionSummary } from '../../api/contract';
import { RecordKeepingClient } from '../../api/record-keeping-client';
import { RecordsClient } from '../../api/records-client';
import { SessionStore } from '../../api/session-store';
import { Announcer } from '../../ui/announcer';
import type { SheetMenuItem } from '../../ui/sheet/sheet-menu';
import { RemovalDialog, Removed } from './removal-dialog';
import type { Removal } from './removal-words';
import { hasOriginal } from './revision-words';

/** A revision and the set it belongs to, as its menu needs them. */
export interface RevisionOfSet {
  readonly revision: RevisionSummary;
  readonly recordSetId: string;
  readonly recordSetName: string;
  /** When it has been deleted and its set is still there. */
  readonly gone: () => void;
}

/** What can be done with a revision, wherever it stands. */
@Injectable({ providedIn: 'root' })
export class RevisionActions {
  private readonly router = inject(Router);
  private readonly dialog = inject(MatDialog);
  private readonly document = inject(DOCUMENT);
  private readonly announcer = inject(Announcer);
  private readonly session = inject(SessionStore);
  private readonly records = inject(RecordsClient);
  private readonly keeping = inject(RecordKeepingClient);

  menuOf(subject: RevisionOfSet): readonly SheetMenuItem[] {
    const { revision } = subject;
    const { id, erasedAt, fileName } = revision;
    const items: SheetMenuItem[] = [];
    if (erasedAt === null) {
      const compare = (): void => void this.router.navigate(['/records/revisions', id, 'compare']);
      items.push({ label: 'Compare with another revision', run: compare });
    }
    if (hasOriginal(revision))
      items.push({ label: 'Download the original file', run: () => this.save(this.records.originalUrl(id), fileName) });
    if (erasedAt === null) items.push({ label: 'Export as CSV', run: () => this.save(this.keeping.tableUrl(id), '') });
    if (this.session.holds('analyst'))
      items.push({ label: `Delete revision ${revision.number}`, run: () => this.remove(subject) });
    return items;
  }

  /** The browser fetches it as any other link's file; an empty name leaves the service's own. */
  private save(url: string, fileName: string): void {
    const link = this.document.createElement('a');
    link.href = url;
    link.download = fileName;
    this.document.body.append(link);
    link.click();
    link.remove();
  }

  private remove({ revision, recordSetName, gone }: RevisionOfSet): void {
    this.dialog
      .open<RemovalDialog, Removal, Removed>(RemovalDialog, {
        data: { revision, recordSetName },
        ariaLabelledBy: 'tb-removal-heading',
        // The button that deletes is never where the keyboard lands.
        autoFocus: 'dialog',
      })
      .afterClosed()
      .subscribe((removed) => {
        if (removed === undefined) return;
        const what = removed.words.charAt(0).toUpperCase() + removed.words.slice(1);
        this.announcer.show(`Deleted: ${what}.`);
        if (removed.setGone) void this.router.navigate(['/records']);
        else gone();
      });
  }
}
