import { Component, computed, inject, input, linkedSignal } from '@angular/core';
import type { RecordColumn } from '../../api/contract';
import { RecordsClient } from '../../api/records-client';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { TableBox } from '../../ui/table-box';
import { cellsOf } from './column-words';

/** The records themselves, a page at a time. */
@Component({
  selector: 'tb-rows-table',
  imports: [LoadingState, Pager, ProblemNotice, TableBox],
  templateUrl: './rows-table.html',
  styleUrl: './rows-table.scss',
})
export class RowsTable {
  private readonly client = inject(RecordsClient);

  readonly revisionId = input.required<string>();
  readonly columns = input.required<readonly RecordColumn[]>();

  private readonly wanted = linkedSignal({ source: () => this.revisionId(), computation: () => 0 });
  protected readonly page = load(() =>
    this.client.readRows(this.revisionId(), { limit: ROWS_A_PAGE, offset: this.wanted() }),
  );
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
      number: page.offset + index + 1,
      cells: row.map((value, column) => ({ text: texts[column][index], missing: value === null })),
    }));
  });

  protected moveTo(offset: number): void {
    this.wanted.set(offset);
  }
}

/** Many headers carry their unit already, as in `draught (m)`. */
function unitBeside(name: string, unit: string | null | undefined): string | undefined {
  return unit && !name.endsWith(`(${unit})`) && !name.endsWith(`[${unit}]`) ? unit : undefined;
}
