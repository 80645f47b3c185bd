import { Component, computed, input, signal } from '@angular/core';
import { MatSortModule } from '@angular/material/sort';
import type { RecordColumn } from '../../api/contract';
import { listView } from '../../ui/list-view';
import { Pager } from '../../ui/pager';
import { Histogram } from '../../ui/plots/histogram';
import { LevelBars } from '../../ui/plots/level-bars';
import { TableBox } from '../../ui/table-box';
import { ColumnDetail } from './column-detail';
import { KIND_WORDS, distinctOf, meanOf, missingOf, rangeOf } from './column-words';

/** Every column of a revision, with its shape; a column's name opens its figures. */
@Component({
  selector: 'tb-columns-table',
  imports: [ColumnDetail, Histogram, LevelBars, MatSortModule, Pager, TableBox],
  templateUrl: './columns-table.html',
  styleUrl: './columns-table.scss',
})
export class ColumnsTable {
  readonly columns = input.required<readonly RecordColumn[]>();
  readonly rowCount = input.required<number>();

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
      distinct: distinctOf(column),
      range: rangeOf(column),
      mean: meanOf(column),
    })),
  );

  protected toggle(name: string): void {
    this.openName.update((open) => (open === name ? undefined : name));
  }
}
