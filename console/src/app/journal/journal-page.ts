import { Component, computed, inject, input } from '@angular/core';
import { Router } from '@angular/router';
import { JournalClient } from '../api/journal-client';
import { EmptyState } from '../ui/empty-state';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { PageHead } from '../ui/page-head';
import { Pager, ROWS_A_PAGE } from '../ui/pager';
import { ProblemNotice } from '../ui/problem-notice';
import { JournalFilterForm } from './journal-filter-form';
import { EMPTY_QUERY, JournalQuery, addressOf, filterOf, isFiltered } from './journal-query';
import { JournalTable } from './journal-table';

/** Who did what. The filter and the page stand in the address, so that a view can be sent to somebody. */
@Component({
  selector: 'tb-journal-page',
  imports: [EmptyState, JournalFilterForm, JournalTable, LoadingState, PageHead, Pager, ProblemNotice],
  templateUrl: './journal-page.html',
})
export class JournalPage {
  private readonly client = inject(JournalClient);
  private readonly router = inject(Router);

  readonly action = input<string>();
  readonly actorId = input<string>();
  readonly subjectKind = input<string>();
  readonly subjectId = input<string>();
  readonly fromDay = input<string>();
  readonly toDay = input<string>();
  readonly offset = input<string>();

  protected readonly query = computed<JournalQuery>(() => ({
    action: this.action() ?? '',
    actorId: this.actorId() ?? '',
    subjectKind: this.subjectKind() ?? '',
    subjectId: this.subjectId() ?? '',
    fromDay: this.fromDay() ?? '',
    toDay: this.toDay() ?? '',
  }));
  protected readonly firstRow = computed(() => Number(/^\d{1,7}$/.exec(this.offset() ?? '')?.[0] ?? 0));
  protected readonly filtered = computed(() => isFiltered(this.query()));
  protected readonly limit = ROWS_A_PAGE;

  protected readonly journal = load(() =>
    this.client.list(filterOf(this.query(), { limit: ROWS_A_PAGE, offset: this.firstRow() })),
  );

  protected filterBy(query: JournalQuery): void {
    void this.router.navigate([], { queryParams: addressOf(query) });
  }

  protected clear(): void {
    this.filterBy(EMPTY_QUERY);
  }

  protected moveTo(offset: number): void {
    void this.router.navigate([], { queryParams: { offset: offset || null }, queryParamsHandling: 'merge' });
  }
}
