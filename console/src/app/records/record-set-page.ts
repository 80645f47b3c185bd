import { Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { RecordsClient } from '../api/records-client';
import { SessionStore } from '../api/session-store';
import { CountPipe } from '../ui/figure-pipes';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { DayPipe } from '../ui/moment-pipes';
import { PageHead } from '../ui/page-head';
import { ProblemNotice } from '../ui/problem-notice';
import { Sheet } from '../ui/sheet/sheet';
import { SheetSection } from '../ui/sheet/sheet-section';
import { NewerFile } from './bring-in/newer-file';
import { RecordSetForm } from './keeping/record-set-form';
import { retentionTold } from './keeping/revision-words';
import { RevisionsTable } from './revisions-table';

@Component({
  selector: 'tb-record-set-page',
  imports: [
    CountPipe,
    DayPipe,
    LoadingState,
    NewerFile,
    PageHead,
    ProblemNotice,
    RecordSetForm,
    RevisionsTable,
    RouterLink,
    Sheet,
    SheetSection,
  ],
  templateUrl: './record-set-page.html',
})
export class RecordSetPage {
  private readonly client = inject(RecordsClient);
  protected readonly session = inject(SessionStore);

  readonly id = input.required<string>();

  protected readonly set = load(() => this.client.read(this.id()));
  protected readonly retentionTold = computed(() => {
    const recordSet = this.set.value();
    return recordSet && retentionTold(recordSet);
  });
}
