import { Component, computed, input, signal } from '@angular/core';
import { formatCount, formatFigure } from '../../ui/figure';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { TableBox } from '../../ui/table-box';
import { heldOutPlot, type HeldOutView } from '../figures/held-out-plot';
import { HeldOutScatter } from '../figures/held-out-scatter';
import type { HeldOutRecord } from './diagnostics';

/** The table shows the records that were furthest off; all of them would be no help. */
const FURTHEST_SHOWN = 50;

/** What records came to against what was estimated without them, as a drawing or a table. */
@Component({
  selector: 'tb-held-out-figure',
  imports: [FigureFrame, HeldOutScatter, PlotTableTemplate, PlotTemplate, TableBox],
  templateUrl: './held-out-figure.html',
  styleUrl: './figures.scss',
})
export class HeldOutFigure {
  readonly records = input.required<readonly HeldOutRecord[]>();
  readonly unit = input.required<string>();
  readonly error = input.required<number>();

  protected readonly view = signal<HeldOutView>('record');
  protected readonly plot = computed(() => heldOutPlot(this.records(), this.view()));
  private readonly suffix = computed(() => (this.unit() ? `, ${this.unit()}` : ''));
  protected readonly acrossLabel = computed(() => `held-out estimate${this.suffix()}`);
  protected readonly upLabel = computed(() =>
    this.view() === 'record' ? `recorded${this.suffix()}` : `recorded minus estimated${this.suffix()}`,
  );
  protected readonly caption = computed(() => {
    const over = this.records().filter(({ recorded, estimate }) => recorded > estimate).length;
    const count = this.records().length;
    return `${formatCount(over)} of the ${formatCount(count)} records drawn came to more than was estimated without them, the rest to as much or less. On the line both agree.`;
  });
  protected readonly rows = computed(() =>
    [...this.records()]
      .sort((left, right) => Math.abs(right.recorded - right.estimate) - Math.abs(left.recorded - left.estimate))
      .slice(0, FURTHEST_SHOWN)
      .map(({ row, recorded, estimate }) => ({
        row: formatCount(row + 1),
        recorded: this.figure(recorded),
        estimate: this.figure(estimate),
        off: formatFigure(recorded - estimate, { uncertainty: this.error(), signed: true }),
      })),
  );

  private figure(value: number): string {
    return formatFigure(value, { uncertainty: this.error() });
  }
}
