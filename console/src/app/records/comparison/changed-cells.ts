import { Component, computed, input, linkedSignal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RevisionComparison } from '../../api/contract';
import { countOf, formatCount } from '../../ui/figure';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { TableBox } from '../../ui/table-box';
import { cellOf } from '../revision/column-words';

interface ChangedCell {
  readonly fromRow: number;
  readonly toRow: number;
  readonly column: string;
  readonly from: string;
  readonly to: string;
}

/** Cell by cell, what rows that both revisions have were and have become. */
@Component({
  selector: 'tb-changed-cells',
  imports: [Pager, RouterLink, TableBox],
  templateUrl: './changed-cells.html',
  styleUrl: './changed-cells.scss',
})
export class ChangedCells {
  readonly comparison = input.required<RevisionComparison>();

  protected readonly offset = linkedSignal({ source: () => this.comparison(), computation: () => 0 });
  protected readonly cells = computed(() => cellsOfChanges(this.comparison()));
  protected readonly page = computed(() => this.cells().slice(this.offset(), this.offset() + ROWS_A_PAGE));
  protected readonly told = computed(() => {
    const { rows, changes } = this.comparison();
    if (rows.changed === 0) return 'No row that both revisions have differs in a column that both have.';
    return changes.length < rows.changed
      ? `The first ${formatCount(changes.length)} of ${countOf(rows.changed, 'row')} that changed, cell by cell.`
      : `${countOf(rows.changed, 'row')} changed, cell by cell.`;
  });
}

function cellsOfChanges({ changes, columns }: RevisionComparison): readonly ChangedCell[] {
  const kinds = new Map(columns.map(({ name, from, to }) => [name, { from: from?.kind, to: to?.kind }]));
  return changes.flatMap(({ fromRow, toRow, cells }) =>
    cells.map(({ column, from, to }) => ({
      ...{ fromRow, toRow, column },
      from: cellOf(from, kinds.get(column)?.from),
      to: cellOf(to, kinds.get(column)?.to),
    })),
  );
}
