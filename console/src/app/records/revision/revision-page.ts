import { Component, computed, effect, inject, input, viewChild } from '@angular/core';
import { Router, RouterLink } from '@angular/router';
import type { RecordRevision } from '../../api/contract';
import { RecordsClient } from '../../api/records-client';
import { SessionStore } from '../../api/session-store';
import { BytesPipe, CountPipe } from '../../ui/figure-pipes';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { DayPipe, MomentPipe } from '../../ui/moment-pipes';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { RevisionActions } from '../keeping/revision-actions';
import { hasOriginal, originOf } from '../keeping/revision-words';
import { PairsSection } from '../pairs/pairs-section';
import { ColumnsTable } from './columns-table';
import { FindingsList } from './findings-list';
import { MendingHistory } from './mending-history';
import { RowsTable } from './rows-table';
import { StartFit } from './start-fit';

const DELIMITER_WORDS: Readonly<Record<string, string>> = { ',': 'comma', ';': 'semicolon', '\t': 'tab', '|': 'pipe' };

/** One uploaded file: what the desk found in it, its rows, and where it came from. */
@Component({
  selector: 'tb-revision-page',
  imports: [
    BytesPipe,
    ColumnsTable,
    CountPipe,
    DayPipe,
    FindingsList,
    LoadingState,
    MendingHistory,
    MomentPipe,
    PageHead,
    PairsSection,
    ProblemNotice,
    RouterLink,
    RowsTable,
    Sheet,
    SheetSection,
    StartFit,
  ],
  templateUrl: './revision-page.html',
  styleUrl: './revision-page.scss',
})
export class RevisionPage {
  private readonly client = inject(RecordsClient);
  private readonly actions = inject(RevisionActions);
  private readonly router = inject(Router);
  protected readonly session = inject(SessionStore);

  readonly id = input.required<string>();
  /** Of the address: a condition that the rows shown meet, and their numbers. */
  readonly where = input<string>();
  readonly numbers = input<string>();

  private readonly rowsSection = viewChild('rows', { read: SheetSection });

  protected readonly revision = load(() => this.client.readRevision(this.id()));
  protected readonly originalUrl = computed(() => this.client.originalUrl(this.id()));
  protected readonly parent = computed(() => {
    const revision = this.revision.value();
    return revision && { label: revision.recordSetName, link: `/records/${revision.recordSetId}` };
  });
  protected readonly origin = computed(() => {
    const revision = this.revision.value();
    return revision && originOf(revision);
  });
  protected readonly hasOriginal = computed(() => {
    const revision = this.revision.value();
    return revision !== undefined && hasOriginal(revision);
  });
  protected readonly menu = computed(() => {
    const revision = this.revision.value();
    if (revision === undefined) return [];
    const { recordSetId, recordSetName } = revision;
    const gone = (): void => void this.router.navigate(['/records', recordSetId]);
    return this.actions.menuOf({ revision, recordSetId, recordSetName, gone });
  });
  protected readonly readingWords = computed(() => {
    const reading = this.revision.value()?.reading;
    return reading ? readingWordsOf(reading) : '';
  });

  /** Rows were asked for and the page has yet to come to rest on them. */
  private moving = false;

  constructor() {
    // The sheet moves when its fragment changes; rows asked for after others have the same one.
    effect(() => {
      if (!this.where() && !this.numbers()) return;
      this.moving = true;
      this.rowsSection()?.show();
    });
  }

  /** Sections above grow as their answers come, and a smooth movement that is under way would end short of the rows. */
  protected settleOnRows(): void {
    if (this.moving) this.rowsSection()?.element.scrollIntoView({ behavior: 'instant' });
    this.moving = false;
  }
}

function readingWordsOf({ sheet, encoding, delimiter, decimal }: RecordRevision['reading']): string {
  if (sheet !== null) return `Sheet “${sheet}” of a workbook`;
  const words = decimal === ',' ? 'decimal comma' : 'decimal point';
  return `${encoding}, separated by ${DELIMITER_WORDS[delimiter] ?? delimiter}, ${words}`;
}
