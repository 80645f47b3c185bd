import { Component, computed, inject } from '@angular/core';
import { MatSortModule } from '@angular/material/sort';
import { RouterLink } from '@angular/router';
import type { RecordSetSummary } from '../api/contract';
import { everyItem } from '../api/page';
import { RecordsClient } from '../api/records-client';
import { SessionStore } from '../api/session-store';
import { EmptyState } from '../ui/empty-state';
import { Field, FieldInput } from '../ui/field';
import { CountPipe } from '../ui/figure-pipes';
import { ListView, listView } from '../ui/list-view';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { MomentPipe } from '../ui/moment-pipes';
import { PageHead } from '../ui/page-head';
import { Pager } from '../ui/pager';
import { ProblemNotice } from '../ui/problem-notice';
import { TableBox } from '../ui/table-box';
import { retentionTold } from './keeping/revision-words';

/** A filter helps from here on; below it is in the way. */
const FILTER_FROM = 6;

@Component({
  selector: 'tb-records-page',
  imports: [
    CountPipe,
    EmptyState,
    Field,
    FieldInput,
    LoadingState,
    MatSortModule,
    MomentPipe,
    PageHead,
    Pager,
    ProblemNotice,
    RouterLink,
    TableBox,
  ],
  templateUrl: './records-page.html',
  styleUrl: './records-page.scss',
})
export class RecordsPage {
  private readonly client = inject(RecordsClient);
  protected readonly session = inject(SessionStore);
  protected readonly retentionTold = retentionTold;

  protected readonly sets = load(() => everyItem((page) => this.client.list(page)));
  protected readonly view: ListView<RecordSetSummary> = listView(() => this.sets.value() ?? [], {
    sortKeys: {
      name: (set) => set.name,
      rows: (set) => set.revision.rowCount,
      columns: (set) => set.revision.columnCount,
      revision: (set) => set.revision.number,
      broughtIn: (set) => set.revision.createdAt,
    },
    firstSort: { active: 'broughtIn', direction: 'desc' },
    words: (set) => `${set.name} ${set.description} ${set.revision.createdBy.name}`,
  });
  protected readonly canFilter = computed(() => (this.sets.value()?.length ?? 0) >= FILTER_FROM);
}
