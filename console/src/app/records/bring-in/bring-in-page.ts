import { Component, computed, inject, signal } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import type { RecordSet } from '../../api/contract';
import { errorOf } from '../../api/problem';
import { RecordsClient } from '../../api/records-client';
import { Announcer } from '../../ui/announcer';
import { EntryForm } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { countOf } from '../../ui/figure';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { nameComplaint } from '../../ui/text-rules';
import { FileChooser } from './file-chooser';
import { fileComplaint, nameFromFile } from './file-complaint';
import { UploadProgress } from './upload-progress';
import { UploadRun } from './upload-run';

const LONGEST_DESCRIPTION = 2000;

@Component({
  selector: 'tb-bring-in-page',
  imports: [Field, FieldInput, FileChooser, PageHead, ProblemNotice, RouterLink, UploadProgress],
  templateUrl: './bring-in-page.html',
})
export class BringInPage {
  private readonly client = inject(RecordsClient);
  private readonly router = inject(Router);
  private readonly announcer = inject(Announcer);

  protected readonly file = signal<File | undefined>(undefined);
  protected readonly typedName = signal<string | undefined>(undefined);
  protected readonly description = signal('');
  protected readonly form = new EntryForm<'file' | 'name' | 'description'>();
  protected readonly run = new UploadRun<RecordSet>();

  /** What was typed stands; until then the file suggests a name. */
  protected readonly name = computed(() => {
    const file = this.file();
    return this.typedName() ?? (file ? nameFromFile(file) : '');
  });
  protected readonly nameError = computed(() => this.form.errorOf('name') ?? errorOf(this.run.problem(), 'name'));

  protected send(event: Event): void {
    event.preventDefault();
    const file = this.file();
    const accepted = this.form.accept({
      file: fileComplaint(file),
      name: nameComplaint(this.name(), 'a name for the record set'),
      description: descriptionComplaint(this.description()),
    });
    if (!accepted || file === undefined) return;
    const upload = this.client.bringIn({ name: this.name().trim(), description: this.description().trim(), file });
    this.run.start(upload, (recordSet) => this.show(recordSet));
  }

  private show({ revision }: RecordSet): void {
    const rows = countOf(revision.rowCount, 'row');
    this.announcer.say(`${rows} and ${countOf(revision.columns.length, 'column')} were read.`);
    void this.router.navigate(['/records/revisions', revision.id]);
  }
}

function descriptionComplaint(text: string): string | undefined {
  if (text.trim().length <= LONGEST_DESCRIPTION) return undefined;
  return `Shorten the description to ${LONGEST_DESCRIPTION} characters; it has ${text.trim().length}`;
}
