import { Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { RecordsClient } from '../../api/records-client';
import { SessionStore } from '../../api/session-store';
import { BytesPipe, CountPipe } from '../../ui/figure-pipes';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { MomentPipe } from '../../ui/moment-pipes';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { ColumnsTable } from './columns-table';
import { FindingsList } from './findings-list';
import { RowsTable } from './rows-table';
import { StartFit } from './start-fit';

const DELIMITER_WORDS: Readonly<Record<string, string>> = { ',': 'comma', ';': 'semicolon', '\t': 'tab' };

/** One uploaded file: what the desk found in it, its rows, and where it came from. */
@Component({
  selector: 'tb-revision-page',
  imports: [
    BytesPipe,
    ColumnsTable,
    CountPipe,
    FindingsList,
    LoadingState,
    MomentPipe,
    PageHead,
    ProblemNotice,
    RouterLink,
    RowsTable,
    Sheet,
    SheetSection,
    StartFit,
  ],
  templateUrl: './revision-page.html',
})
export class RevisionPage {
  private readonly client = inject(RecordsClient);
  protected readonly session = inject(SessionStore);

  readonly id = input.required<string>();

  protected readonly revision = load(() => this.client.readRevision(this.id()));
  protected readonly originalUrl = computed(() => this.client.originalUrl(this.id()));
  protected readonly parent = computed(() => {
    const revision = this.revision.value();
    return revision && { label: revision.recordSetName, link: `/records/${revision.recordSetId}` };
  });
  protected readonly readingWords = computed(() => {
    const reading = this.revision.value()?.reading;
    if (!reading) return '';
    const delimiter = DELIMITER_WORDS[reading.delimiter] ?? reading.delimiter;
    const decimal = reading.decimal === ',' ? 'decimal comma' : 'decimal point';
    return `${reading.encoding}, separated by ${delimiter}, ${decimal}`;
  });
}
