import { Component, computed, input } from '@angular/core';
import { scaleLinear } from 'd3-scale';
import { countOf, formatFigure } from '../figure';
import { formatRecordedDay } from '../moment';

/** Two columns of figures counted over the same stretches. */
export interface PairedCounts {
  readonly edges: readonly number[];
  readonly from: readonly number[];
  readonly to: readonly number[];
}

const WIDTH = 320;
const HALF = 60;
let pairCount = 0;

/** The earlier counts hang below the line and the later ones stand on it, each drawn as shares of its own rows. */
@Component({
  selector: 'tb-paired-histogram',
  templateUrl: './paired-histogram.html',
  styleUrl: './paired-histogram.scss',
  host: { '[class.small]': 'small()' },
})
export class PairedHistogram {
  readonly counts = input.required<PairedCounts>();
  readonly label = input.required<string>();
  readonly fromName = input.required<string>();
  readonly toName = input.required<string>();
  readonly unit = input<string | null>(null);
  /** Edges are days since 1970-01-01. */
  readonly dates = input(false);
  /** Leaves names and ends off, for a table's row. */
  readonly small = input(false);

  protected readonly id = `tb-paired-histogram-${++pairCount}`;
  protected readonly width = WIDTH;
  protected readonly box = `0 ${-HALF} ${WIDTH} ${2 * HALF}`;
  protected readonly bars = computed(() => pairedBars(this.counts()));
  protected readonly ends = computed(() => {
    const { edges } = this.counts();
    return { low: this.edgeText(edges[0]), high: this.edgeText(edges[edges.length - 1]) };
  });
  protected readonly description = computed(() => {
    const { from, to } = this.counts();
    const { low, high } = this.ends();
    return `Between ${low} and ${high}: ${countOf(sum(from), 'row')} of ${this.fromName()} below the line, ${countOf(sum(to), 'row')} of ${this.toName()} above it.`;
  });

  private edgeText(edge: number | undefined): string {
    if (edge === undefined) return '';
    return this.dates() ? formatRecordedDay(edge) : formatFigure(edge, { unit: this.unit() });
  }
}

interface PairedBar {
  readonly x: number;
  readonly width: number;
  readonly from: number;
  readonly to: number;
}

const LEAST_VISIBLE = 1;

/** Area is share of the side's own rows, and both sides share one measure; wherever there is a row, something is drawn. */
function pairedBars({ edges, from, to }: PairedCounts): readonly PairedBar[] {
  const across = scaleLinear([edges[0] ?? 0, edges[edges.length - 1] ?? 1], [0, WIDTH]);
  const [before, after] = [densitiesOf(from, edges), densitiesOf(to, edges)];
  const greatest = Math.max(...before, ...after) || 1;
  const height = (density: number): number =>
    density === 0 ? 0 : Math.max(LEAST_VISIBLE, (HALF * density) / greatest);
  return before.map((density, index) => ({
    x: across(edges[index]),
    width: Math.max(LEAST_VISIBLE, across(edges[index + 1]) - across(edges[index])),
    from: height(density),
    to: height(after[index]),
  }));
}

function densitiesOf(counts: readonly number[], edges: readonly number[]): readonly number[] {
  const total = sum(counts) || 1;
  return counts.map((count, index) => count / total / (edges[index + 1] - edges[index] || 1));
}

function sum(counts: readonly number[]): number {
  return counts.reduce((total, count) => total + count, 0);
}
