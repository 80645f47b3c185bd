import { Component, computed, inject, input, linkedSignal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { withUnit } from '@widget/format/number-format';
import type { RecordColumn } from '../../api/contract';
import { LookingClient } from '../../api/looking-client';
import { countOf, formatCount } from '../../ui/figure';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import type { Pair } from '../../ui/plots/correlation-map';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { ScatterPlot, ScatterPoint } from '../../ui/plots/scatter-plot';
import { ProblemNotice } from '../../ui/problem-notice';
import { TableBox } from '../../ui/table-box';
import { cellOf } from '../revision/column-words';
import { variableOf } from './pair-words';

/** Two columns against each other, as a drawing or a table; a point leads to its row. */
@Component({
  selector: 'tb-scatter-figure',
  imports: [
    FigureFrame,
    LoadingState,
    Pager,
    PlotTableTemplate,
    PlotTemplate,
    ProblemNotice,
    RouterLink,
    ScatterPlot,
    TableBox,
  ],
  templateUrl: './scatter-figure.html',
})
export class ScatterFigure {
  private readonly client = inject(LookingClient);

  readonly revisionId = input.required<string>();
  readonly columns = input.required<readonly RecordColumn[]>();
  readonly pair = input.required<Pair>();

  protected readonly found = load(() => {
    const { x, y } = this.pair();
    return this.client.readScatter(this.revisionId(), x, y);
  });
  /** The answer's own columns: while the next one is on its way, the older drawing keeps its names. */
  protected readonly x = computed(() => variableOf(this.columns(), this.found.value()?.x ?? this.pair().x));
  protected readonly y = computed(() => variableOf(this.columns(), this.found.value()?.y ?? this.pair().y));
  protected readonly points = computed(() => this.found.value()?.points ?? []);
  protected readonly heading = computed(() => `${this.y().name} against ${this.x().name}`);
  protected readonly caption = computed(() => {
    const total = this.found.value()?.total ?? 0;
    const drawn = this.points().length;
    const rows =
      drawn < total ? `${formatCount(drawn)} of ${countOf(total, 'row')}, drawn by lot` : countOf(total, 'row');
    return `${rows}. Choose a point to see its row.`;
  });
  protected readonly chosen = linkedSignal<unknown, ScatterPoint | undefined>({
    source: () => this.found.value(),
    computation: () => undefined,
  });
  protected readonly chosenWords = computed(() => {
    const point = this.chosen();
    return point && `${this.x().name} ${this.figure(point, 'x')}, ${this.y().name} ${this.figure(point, 'y')}`;
  });
  protected readonly offset = linkedSignal<unknown, number>({
    source: () => this.found.value(),
    computation: () => 0,
  });
  protected readonly rows = computed(() =>
    [...this.points()]
      .sort((a, b) => a.row - b.row)
      .slice(this.offset(), this.offset() + ROWS_A_PAGE)
      .map((point) => ({ row: point.row, x: this.figure(point, 'x'), y: this.figure(point, 'y') })),
  );

  private figure(point: ScatterPoint, side: 'x' | 'y'): string {
    const { unit, date } = side === 'x' ? this.x() : this.y();
    return withUnit(cellOf(point[side], date ? 'date' : 'numeric'), unit);
  }
}
