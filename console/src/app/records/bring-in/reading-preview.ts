import { Component, computed, input, linkedSignal, signal } from '@angular/core';
import type { ReadingProposal } from '../../api/contract';
import { ChoiceGroup } from '../../ui/choice-group';
import { CountPipe } from '../../ui/figure-pipes';
import { Pager } from '../../ui/pager';
import { TableBox } from '../../ui/table-box';
import { unitBeside } from '../../ui/unit-beside';
import { Showing, previewCells } from './preview-cells';

/** Columns drawn at once: as many as can be taken in, and few enough for a file of two thousand. */
const COLUMNS_AT_ONCE = 12;

/** The first rows of the file, as they would count. */
@Component({
  selector: 'tb-reading-preview',
  imports: [ChoiceGroup, CountPipe, Pager, TableBox],
  templateUrl: './reading-preview.html',
  styleUrl: './reading-preview.scss',
})
export class ReadingPreview {
  readonly proposal = input.required<ReadingProposal>();
  /** A newer answer is on its way. */
  readonly asking = input(false);

  protected readonly atOnce = COLUMNS_AT_ONCE;
  protected readonly showing = signal<Showing>('read');
  private readonly columnCount = computed(() => this.proposal().columns.length);
  protected readonly offset = linkedSignal<number, number>({ source: this.columnCount, computation: () => 0 });
  protected readonly heads = computed(() =>
    this.proposal()
      .columns.slice(this.offset(), this.offset() + COLUMNS_AT_ONCE)
      .map((column) => ({ ...column, unit: unitBeside(column.name, column.unit) ?? null })),
  );
  protected readonly hasUnreadable = computed(() => this.heads().some((column) => column.unreadableRows.length > 0));
  protected readonly rows = computed(() => {
    const cells = previewCells(this.proposal(), this.heads(), this.showing());
    return this.proposal().written.map((_, row) => cells.map((column) => column[row]));
  });
}
