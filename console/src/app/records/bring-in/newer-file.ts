import { Component, computed, inject, input, linkedSignal, signal } from '@angular/core';
import { Router } from '@angular/router';
import type { IncomingFile, RecordSetDetail, RevisionSummary } from '../../api/contract';
import { IncomingFilesClient } from '../../api/incoming-files-client';
import { ChoiceGroup } from '../../ui/choice-group';
import { EntryForm } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { CountPipe } from '../../ui/figure-pipes';
import { ProblemNotice } from '../../ui/problem-notice';
import { FileChooser } from './file-chooser';
import { fileComplaint } from './file-complaint';
import { UploadProgress } from './upload-progress';
import { UploadRun } from './upload-run';

type Becomes = 'revision' | 'appended';

/** Sends a further file for a record set: as its next revision, or to append its rows to a revision. */
@Component({
  selector: 'tb-newer-file',
  imports: [ChoiceGroup, CountPipe, Field, FieldInput, FileChooser, ProblemNotice, UploadProgress],
  templateUrl: './newer-file.html',
})
export class NewerFile {
  private readonly client = inject(IncomingFilesClient);
  private readonly router = inject(Router);

  readonly recordSet = input.required<RecordSetDetail>();

  protected readonly file = signal<File | undefined>(undefined);
  protected readonly form = new EntryForm<'file'>();
  protected readonly run = new UploadRun<IncomingFile>();
  protected readonly becomes = signal<Becomes>('revision');
  protected readonly nextNumber = computed(() => this.recordSet().lastNumber + 1);
  /** Newest first; the rows of the others are no longer there. */
  protected readonly appendable = computed(() =>
    this.recordSet()
      .revisions.filter(({ erasedAt }) => erasedAt === null)
      .sort((a, b) => b.number - a.number),
  );
  private readonly unmended = computed(() => this.appendable().find(({ origin }) => origin !== 'mended'));
  protected readonly appendTo = linkedSignal(() => (this.unmended() ?? this.appendable()[0])?.id ?? '');
  protected readonly appendHint = computed(() =>
    this.hintFor(this.appendable().find(({ id }) => id === this.appendTo())),
  );

  protected send(event: Event): void {
    event.preventDefault();
    const file = this.file();
    if (!this.form.accept({ file: fileComplaint(file) }) || file === undefined) return;
    this.run.start(this.client.send(file), ({ id }) => this.look(id));
  }

  private look(incomingId: string): void {
    const queryParams =
      this.becomes() === 'appended' ? { appendTo: this.appendTo() } : { recordSet: this.recordSet().id };
    void this.router.navigate(['/records/bring-in', incomingId], { queryParams });
  }

  private hintFor(revision: RevisionSummary | undefined): string | undefined {
    if (revision?.origin === 'mended')
      return `Revision ${revision.number} was mended, and the new rows would not be: its rows and theirs may differ in what was put right.`;
    const isNewest = revision?.number === this.appendable()[0]?.number;
    return isNewest
      ? undefined
      : 'A later revision was mended. New rows come as files do, so they go behind unmended ones; mend the result afterwards.';
  }
}
