import { Component, computed, input, signal } from '@angular/core';
import { MatSortModule } from '@angular/material/sort';
import { RouterLink } from '@angular/router';
import type { RecordColumn, RecordRevision } from '../../api/contract';
import { NO_FIGURE } from '../../ui/figure';
import { listView } from '../../ui/list-view';
import { Pager } from '../../ui/pager';
import { Histogram } from '../../ui/plots/histogram';
import { LevelBars } from '../../ui/plots/level-bars';
import { TableBox } from '../../ui/table-box';
import { ColumnDetail } from './column-detail';
import { KIND_WORDS, distinctOf, meanOf, missingOf, rangeOf } from './column-words';
import { missingIn } from './rows-condition';

/** Every column of a revision, with its shape; a column's name opens its figures. */
@Component({
  selector: 'tb-columns-table',
  imports: [ColumnDetail, Histogram, LevelBars, MatSortModule, Pager, RouterLink, TableBox],
  templateUrl: './columns-table.html',
  styleUrl: './columns-table.scss',
})
export class ColumnsTable {
  readonly columns = input.required<readonly RecordColumn[]>();
  readonly rowCount = input.required<number>();
  /** Columns with cells that did not fit their kind. */
  readonly unreadable = input<RecordRevision['reading']['unreadable']>([]);
  /** Whether there are rows that figures can lead to; erased rows leave no figures either. */
  readonly linked = input(true);

  protected readonly view = listView(() => this.columns(), {
    sortKeys: {
      position: (column: RecordColumn) => column.position,
      name: (column: RecordColumn) => column.name,
      kind: (column: RecordColumn) => KIND_WORDS[column.kind],
      missing: (column: RecordColumn) => column.missingCount,
      distinct: (column: RecordColumn) => column.distinctCount,
    },
    firstSort: { active: 'position', direction: 'asc' },
  });
  protected readonly openName = signal<string | undefined>(undefined);
  protected readonly rows = computed(() =>
    this.view.rows().map((column) => ({
      column,
      kind: KIND_WORDS[column.kind],
      missing: missingOf(column, this.rowCount()),
      missingRows: this.linked() && column.missingCount > 0 ? missingIn(column) : undefined,
      distinct: this.linked() ? distinctOf(column) : NO_FIGURE,
      range: rangeOf(column),
      mean: meanOf(column),
      unreadable: this.unreadable().find((each) => each.column === column.name)?.count ?? 0,
    })),
  );

  protected toggle(name: string): void {
    this.openName.update((open) => (open === name ? undefined : name));
  }
}
