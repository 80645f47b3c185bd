import { Component, computed, input } from '@angular/core';
import type { ColumnComparison, RevisionComparison } from '../../api/contract';
import { formatCount, formatShare } from '../../ui/figure';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { PairedHistogram } from '../../ui/plots/paired-histogram';
import { TableBox } from '../../ui/table-box';
import { betweenReadings } from '../revision/column-words';
import { figurePairs } from './comparison-words';

interface LevelSide {
  readonly count: string;
  readonly share: string;
  /** Of the fullest bar on either side. */
  readonly percent: number;
}

/** One column in both revisions: figures beside each other and the two distributions over the same stretches. */
@Component({
  selector: 'tb-compared-column',
  imports: [FigureFrame, PairedHistogram, PlotTableTemplate, PlotTemplate, TableBox],
  templateUrl: './compared-column.html',
  styleUrl: './compared-column.scss',
})
export class ComparedColumn {
  readonly column = input.required<ColumnComparison>();
  readonly comparison = input.required<RevisionComparison>();

  protected readonly fromName = computed(() => `revision ${this.comparison().from.number}`);
  protected readonly toName = computed(() => `revision ${this.comparison().to.number}`);
  protected readonly figures = computed(() => {
    const { from, to } = this.comparison();
    return figurePairs(this.column(), { from: from.rowCount, to: to.rowCount });
  });
  protected readonly kind = computed(() => this.column().to?.kind ?? this.column().from?.kind ?? 'text');
  protected readonly unit = computed(() => this.column().to?.unit ?? null);
  protected readonly stretches = computed(() => {
    const shape = this.column().shape;
    if (!shape || shape.edges.length === 0) return undefined;
    const edge = (index: number): string => betweenReadings(shape.edges[index], this.kind());
    const rows = shape.from.map((count, index) => ({
      ...{ low: edge(index), high: edge(index + 1) },
      ...{ from: formatCount(count), to: formatCount(shape.to[index]) },
    }));
    return { shape, rows };
  });
  protected readonly levels = computed(() => {
    const shape = this.column().shape;
    if (!shape || shape.levels.length === 0) return [];
    const [from, to] = [this.presentIn('from'), this.presentIn('to')];
    const greatest = Math.max(...shape.from.map((count) => count / from), ...shape.to.map((count) => count / to));
    const side = (count: number, present: number): LevelSide => ({
      count: formatCount(count),
      share: formatShare(count / present),
      percent: (100 * count) / present / (greatest || 1),
    });
    return shape.levels.map((name, index) => ({
      name,
      from: side(shape.from[index], from),
      to: side(shape.to[index], to),
    }));
  });

  private presentIn(side: 'from' | 'to'): number {
    const missing = this.column()[side]?.missingCount ?? 0;
    return Math.max(1, this.comparison()[side].rowCount - missing);
  }
}
