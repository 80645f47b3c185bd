import { Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { withUnit } from '@widget/format/number-format';
import { scaleLinear } from 'd3-scale';
import type { RecordColumn } from '../../api/contract';
import { countOf } from '../../ui/figure';
import { histogramBars } from '../../ui/plots/histogram';
import { betweenReadings } from './column-words';
import { stretchIn } from './rows-condition';

const WIDTH = 320;
const HEIGHT = 100;
/** Room above the bars for the line of quantiles. */
const HEAD = 24;
/** Between bars; the narrowest bar is wider. */
const GAP = 0.8;
let shapeCount = 0;

/** A column's histogram, each bar leading to its rows, under a line that marks median, quartiles, 1% and 99%. */
@Component({
  selector: 'tb-column-shape',
  imports: [RouterLink],
  templateUrl: './column-shape.html',
  styleUrl: './column-shape.scss',
})
export class ColumnShape {
  readonly column = input.required<RecordColumn>();
  readonly linked = input(true);

  protected readonly id = `tb-column-shape-${++shapeCount}`;
  protected readonly box = `0 ${-HEAD} ${WIDTH} ${HEAD + HEIGHT + 1}`;
  protected readonly width = WIDTH;
  protected readonly gap = GAP;
  protected readonly floor = HEIGHT;
  protected readonly line = -HEAD / 2;
  protected readonly bars = computed(() => {
    const { histogram } = this.column();
    if (!histogram) return [];
    return histogramBars(histogram, { width: WIDTH, height: HEIGHT }).map((bar, index) => ({
      ...bar,
      where: this.linked() && histogram.counts[index] > 0 ? this.conditionOf(index) : undefined,
      words: `${this.edge(index)} to ${this.edge(index + 1)}: ${countOf(histogram.counts[index], 'row')}`,
    }));
  });
  protected readonly marks = computed(() => quantileMarks(this.column()));
  protected readonly ends = computed(() => ({ low: this.edge(0), high: this.edge(this.bars().length) }));
  protected readonly description = computed(() => {
    const total = this.column().histogram?.counts.reduce((sum, count) => sum + count, 0) ?? 0;
    const range = `${countOf(total, 'row')} between ${this.ends().low} and ${this.ends().high}.`;
    return this.linked() ? `${range} Each bar leads to its rows.` : range;
  });

  private edge(index: number): string {
    const { histogram, kind, unit } = this.column();
    const edge = histogram?.edges[index];
    return edge === undefined ? '' : withUnit(betweenReadings(edge, kind), unit);
  }

  private conditionOf(index: number): string | undefined {
    const { edges, counts } = this.column().histogram ?? { edges: [], counts: [] };
    const closed = index === counts.length - 1;
    return stretchIn(this.column(), { from: edges[index], to: edges[index + 1], closed });
  }
}

interface QuantileMarks {
  readonly low: number;
  readonly lowerQuartile: number;
  readonly median: number;
  readonly upperQuartile: number;
  readonly high: number;
}

/** Where the quantiles stand across the drawing; undefined unless all five were taken and the readings differ. */
function quantileMarks({ histogram, quantiles }: RecordColumn): QuantileMarks | undefined {
  if (!histogram || !quantiles) return undefined;
  const [first, last] = [histogram.edges[0], histogram.edges[histogram.edges.length - 1]];
  if (!(last > first)) return undefined;
  const across = scaleLinear([first, last], [0, WIDTH]);
  const places = [0.01, 0.25, 0.5, 0.75, 0.99].map((share) => quantiles.find((each) => each.share === share));
  if (places.some((place) => place === undefined)) return undefined;
  const [low, lowerQuartile, median, upperQuartile, high] = places.map((place) => across(place?.value ?? first));
  return { low, lowerQuartile, median, upperQuartile, high };
}
