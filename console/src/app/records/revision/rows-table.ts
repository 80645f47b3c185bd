import { Component, computed, effect, inject, input, linkedSignal, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RecordColumn } from '../../api/contract';
import { LookingClient } from '../../api/looking-client';
import { Announcer } from '../../ui/announcer';
import { countOf } from '../../ui/figure';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { TableBox } from '../../ui/table-box';
import { unitBeside } from '../../ui/unit-beside';
import { cellsOf } from './column-words';
import { RowsFilter, conditionComplaint } from './rows-filter';

/** The records themselves, a page at a time: all of them, or those that the page's address asks for. */
@Component({
  selector: 'tb-rows-table',
  imports: [LoadingState, Pager, ProblemNotice, RouterLink, RowsFilter, TableBox],
  templateUrl: './rows-table.html',
  styleUrl: './rows-table.scss',
})
export class RowsTable {
  private readonly client = inject(LookingClient);
  private readonly announcer = inject(Announcer);

  readonly revisionId = input.required<string>();
  readonly columns = input.required<readonly RecordColumn[]>();
  readonly where = input<string>();
  readonly numbers = input<string>();
  /** Rows that were asked for have come. */
  readonly found = output();

  private readonly wanted = linkedSignal({
    source: () => [this.revisionId(), this.where(), this.numbers()],
    computation: () => 0,
  });
  protected readonly page = load(() =>
    this.client.readRows(
      this.revisionId(),
      { where: this.where(), numbers: this.numbers() },
      { limit: ROWS_A_PAGE, offset: this.wanted() },
    ),
  );
  protected readonly filtered = computed(() => Boolean(this.where() || this.numbers()));
  /** While other rows are on their way, what stands here is not what was asked for. */
  protected readonly total = computed(() =>
    this.page.state() === 'ready' && !this.page.reloading() ? this.page.value()?.total : undefined,
  );
  protected readonly refusedCondition = computed(() => conditionComplaint(this.page.problem()) !== undefined);
  protected readonly heads = computed(() => {
    const known = new Map(this.columns().map((column) => [column.name, column]));
    return (this.page.value()?.columns ?? []).map((name) => ({
      name,
      kind: known.get(name)?.kind,
      unit: unitBeside(name, known.get(name)?.unit),
    }));
  });
  protected readonly rows = computed(() => {
    const page = this.page.value();
    if (!page) return [];
    const texts = this.heads().map(({ kind }, column) =>
      cellsOf(
        page.rows.map((row) => row[column]),
        kind,
      ),
    );
    return page.rows.map((row, index) => ({
      number: page.numbers[index],
      cells: row.map((value, column) => ({ text: texts[column][index], missing: value === null })),
    }));
  });

  constructor() {
    effect(() => {
      const total = this.total();
      if (total === undefined || !this.filtered()) return;
      this.announcer.say(`${countOf(total, 'row')} found.`);
      this.found.emit();
    });
    effect(() => {
      const complaint = conditionComplaint(this.page.problem());
      if (complaint !== undefined) this.announcer.say(complaint);
    });
  }

  protected moveTo(offset: number): void {
    this.wanted.set(offset);
  }
}
