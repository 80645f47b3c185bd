import { Component, computed, input } from '@angular/core';
import { withUnit } from '@widget/format/number-format';
import type { RecordColumn } from '../../api/contract';
import { NO_FIGURE, formatCount, formatShare } from '../../ui/figure';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { Histogram } from '../../ui/plots/histogram';
import { KIND_WORDS, cellOf, distinctOf, meanOf, missingOf, rangeOf, spreadOf } from './column-words';

/** Levels beyond these are summed into one line. */
const LEVELS_SHOWN = 12;

/** One column's figures in full: facts, and its histogram or its levels. */
@Component({
  selector: 'tb-column-detail',
  imports: [FigureFrame, Histogram, PlotTableTemplate, PlotTemplate],
  templateUrl: './column-detail.html',
  styleUrl: './column-detail.scss',
})
export class ColumnDetail {
  readonly column = input.required<RecordColumn>();
  readonly rowCount = input.required<number>();

  protected readonly facts = computed(() => {
    const column = this.column();
    const inUnit = (figure: string): string => (figure === NO_FIGURE ? figure : withUnit(figure, column.unit));
    const facts = [
      { name: 'Kind', value: KIND_WORDS[column.kind] },
      { name: 'Missing', value: missingOf(column, this.rowCount()) },
      { name: 'Distinct values', value: distinctOf(column) },
      { name: 'Range', value: inUnit(rangeOf(column)) },
      { name: 'Mean', value: inUnit(meanOf(column)) },
      { name: 'Standard deviation', value: inUnit(spreadOf(column)) },
    ];
    return facts.filter(({ value }) => value !== NO_FIGURE);
  });
  protected readonly bins = computed(() => {
    const { histogram, kind } = this.column();
    const edge = (index: number): string => cellOf(histogram?.edges[index] ?? null, kind);
    return (histogram?.counts ?? []).map((count, index) => ({
      from: edge(index),
      to: edge(index + 1),
      count: formatCount(count),
    }));
  });
  protected readonly levels = computed(() => this.levelRows());

  private levelRows(): readonly { name: string; count: string; share: string; percent: number }[] {
    const { levels, missingCount } = this.column();
    const present = Math.max(1, this.rowCount() - missingCount);
    const shown = levels.slice(0, LEVELS_SHOWN);
    const others = present - shown.reduce((sum, { count }) => sum + count, 0);
    const rows = others > 0 && levels.length > 0 ? [...shown, { value: 'All others', count: others }] : shown;
    return rows.map(({ value, count }) => ({
      name: value,
      count: formatCount(count),
      share: formatShare(count / present),
      percent: (100 * count) / present,
    }));
  }
}
