import { Component, inject, input, signal } from '@angular/core';
import { Router } from '@angular/router';
import type { RecordRevision } from '../../api/contract';
import { RecordsClient } from '../../api/records-client';
import { Announcer } from '../../ui/announcer';
import { EntryForm } from '../../ui/entry-form';
import { countOf } from '../../ui/figure';
import { ProblemNotice } from '../../ui/problem-notice';
import { FileChooser } from './file-chooser';
import { fileComplaint } from './file-complaint';
import { UploadProgress } from './upload-progress';
import { UploadRun } from './upload-run';

/** Adds a revision to a record set. */
@Component({
  selector: 'tb-newer-file',
  imports: [FileChooser, ProblemNotice, UploadProgress],
  template: `
    <p>
      It becomes revision {{ nextNumber() }}. Earlier revisions stay, and so do the fits and editions that were made
      from them.
    </p>
    @if (run.progress(); as progress) {
      <tb-upload-progress
        class="tb-form"
        [fileName]="file()?.name ?? ''"
        [progress]="progress"
        [beingRead]="run.beingRead()"
        (cancelled)="run.cancel()"
      />
    } @else {
      <form class="tb-form" novalidate (submit)="send($event)">
        @if (run.problem(); as problem) {
          <tb-problem-notice [problem]="problem" [canRetry]="false" />
        }
        <tb-file-chooser label="Choose the newer file" [error]="form.errorOf('file')" [(file)]="file" />
        <div class="tb-actions">
          <button type="submit" class="tb-plain-button">Bring in as revision {{ nextNumber() }}</button>
        </div>
      </form>
    }
  `,
})
export class NewerFile {
  private readonly client = inject(RecordsClient);
  private readonly router = inject(Router);
  private readonly announcer = inject(Announcer);

  readonly recordSetId = input.required<string>();
  readonly nextNumber = input.required<number>();

  protected readonly file = signal<File | undefined>(undefined);
  protected readonly form = new EntryForm<'file'>();
  protected readonly run = new UploadRun<RecordRevision>();

  protected send(event: Event): void {
    event.preventDefault();
    const file = this.file();
    if (!this.form.accept({ file: fileComplaint(file) }) || file === undefined) return;
    this.run.start(this.client.bringInRevision(this.recordSetId(), file), (revision) => this.show(revision));
  }

  private show(revision: RecordRevision): void {
    this.announcer.say(`${countOf(revision.rowCount, 'row')} were read as revision ${revision.number}.`);
    void this.router.navigate(['/records/revisions', revision.id]);
  }
}
