import { Component, computed, input } from '@angular/core';
import type { FitResult } from '../../api/contract';
import { formatFigure } from '../../ui/figure';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { TableBox } from '../../ui/table-box';
import { PenaltyPath } from '../figures/penalty-path';
import { penaltyPathPlot, weightName } from '../figures/penalty-path-plot';

/** The table shows this many points of the path, evenly chosen, so that it can be read across. */
const TABLE_POINTS = 8;

/** How the weights grow as the penalty is let go, as a drawing or a table. */
@Component({
  selector: 'tb-penalty-path-figure',
  imports: [FigureFrame, PenaltyPath, PlotTableTemplate, PlotTemplate, TableBox],
  templateUrl: './penalty-path-figure.html',
  styleUrl: './figures.scss',
})
export class PenaltyPathFigure {
  readonly result = input.required<FitResult>();
  readonly scaleUnit = input.required<string>();

  protected readonly plot = computed(() => penaltyPathPlot(this.result()));
  protected readonly weightLabel = computed(
    () => `standardised weight${this.scaleUnit() ? `, ${this.scaleUnit()}` : ''}`,
  );
  protected readonly caption = computed(() => {
    const leftOut = this.plot()?.leftOut ?? 0;
    const also = leftOut > 0 ? ` ${leftOut} smaller weights are not drawn; the table of weights has them.` : '';
    return `From left to right the penalty is let go. The largest weights at the chosen point are named.${also}`;
  });
  private readonly points = computed(() => {
    const path = [...this.result().path].sort(
      (left, right) => left.effectiveDegreesOfFreedom - right.effectiveDegreesOfFreedom,
    );
    if (path.length <= TABLE_POINTS) return path;
    return Array.from(
      { length: TABLE_POINTS },
      (_, step) => path[Math.round((step * (path.length - 1)) / (TABLE_POINTS - 1))],
    );
  });
  protected readonly columns = computed(() =>
    this.points().map((point) => formatFigure(point.effectiveDegreesOfFreedom, { significant: 3 })),
  );
  protected readonly rows = computed(() =>
    this.result()
      .weights.map((weight, position) => ({
        name: weightName(weight),
        size: Math.abs(weight.standardised),
        figures: this.points().map((point) => formatFigure(point.standardised[position] ?? null, { significant: 3 })),
      }))
      .sort((left, right) => right.size - left.size),
  );
}
