import { Component, computed, input } from '@angular/core';
import { scaleLinear } from 'd3-scale';
import type { Histogram as HistogramCounts } from '../../api/contract';
import { countOf, formatFigure } from '../figure';
import { formatRecordedDay } from '../moment';

export interface Bar {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

const WIDTH = 320;
const HEIGHT = 120;
const FOOT = 20;
const LEAST_VISIBLE = 1;
let histogramCount = 0;

/** Counts between neighbouring edges. `small` leaves the axis off, for a table's row. */
@Component({
  selector: 'tb-histogram',
  templateUrl: './histogram.html',
  styleUrl: './histogram.scss',
  host: { '[class.small]': 'small()' },
})
export class Histogram {
  readonly counts = input.required<HistogramCounts>();
  readonly label = input.required<string>();
  readonly unit = input<string | null>(null);
  /** Edges are days since 1970-01-01. */
  readonly dates = input(false);
  readonly small = input(false);

  protected readonly id = `tb-histogram-${++histogramCount}`;
  protected readonly width = WIDTH;
  protected readonly floor = HEIGHT - FOOT;
  protected readonly viewBox = computed(() => `0 0 ${WIDTH} ${this.small() ? HEIGHT - FOOT : HEIGHT}`);
  protected readonly bars = computed(() => histogramBars(this.counts(), { width: WIDTH, height: HEIGHT - FOOT }));
  protected readonly ends = computed(() => {
    const { edges } = this.counts();
    return { low: this.edgeText(edges[0]), high: this.edgeText(edges[edges.length - 1]) };
  });
  protected readonly description = computed(() => this.describe());

  private edgeText(edge: number | undefined): string {
    if (edge === undefined) return '';
    return this.dates() ? formatRecordedDay(edge) : formatFigure(edge, { unit: this.unit() ?? undefined });
  }

  private describe(): string {
    const { counts, edges } = this.counts();
    const most = Math.max(...counts);
    const at = counts.indexOf(most);
    const total = counts.reduce((sum, count) => sum + count, 0);
    const fullest = `the fullest bar, ${this.edgeText(edges[at])} to ${this.edgeText(edges[at + 1])}, holds ${countOf(most, 'row')}`;
    return `${countOf(total, 'row')} between ${this.ends().low} and ${this.ends().high}; ${fullest}.`;
  }
}

interface BarRoom {
  readonly width: number;
  readonly height: number;
}

/** Area is share, so that bars of unequal width do not mislead: height is count over width. */
export function histogramBars({ counts, edges }: HistogramCounts, { width, height }: BarRoom): readonly Bar[] {
  const x = scaleLinear([edges[0] ?? 0, edges[edges.length - 1] ?? 1], [0, width]);
  const densities = counts.map((count, index) => count / (edges[index + 1] - edges[index] || 1));
  const y = scaleLinear([0, Math.max(...densities)], [0, height]);
  return counts.map((count, index) => {
    const left = x(edges[index]);
    const tall = count === 0 ? 0 : Math.max(LEAST_VISIBLE, y(densities[index]));
    return { x: left, y: height - tall, width: Math.max(LEAST_VISIBLE, x(edges[index + 1]) - left), height: tall };
  });
}
