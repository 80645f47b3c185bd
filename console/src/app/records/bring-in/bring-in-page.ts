import { Component, inject, signal } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import type { IncomingFile } from '../../api/contract';
import { IncomingFilesClient } from '../../api/incoming-files-client';
import { EntryForm } from '../../ui/entry-form';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { FileChooser } from './file-chooser';
import { fileComplaint } from './file-complaint';
import { UploadProgress } from './upload-progress';
import { UploadRun } from './upload-run';

/** The first step of bringing a file in: sending it. */
@Component({
  selector: 'tb-bring-in-page',
  imports: [FileChooser, PageHead, ProblemNotice, RouterLink, UploadProgress],
  templateUrl: './bring-in-page.html',
})
export class BringInPage {
  private readonly client = inject(IncomingFilesClient);
  private readonly router = inject(Router);

  protected readonly file = signal<File | undefined>(undefined);
  protected readonly form = new EntryForm<'file'>();
  protected readonly run = new UploadRun<IncomingFile>();

  protected send(event: Event): void {
    event.preventDefault();
    const file = this.file();
    if (!this.form.accept({ file: fileComplaint(file) }) || file === undefined) return;
    this.run.start(this.client.send(file), ({ id }) => void this.router.navigate(['/records/bring-in', id]));
  }
}
