import { Component, computed, input } from '@angular/core';
import { formatCount, formatFigure, formatShare } from '../../ui/figure';
import { TableBox } from '../../ui/table-box';
import type { Diagnostics } from './diagnostics';

const LARGEST_SHOWN = 10;

/** Further signs of trouble: intervals that hold too little, inputs that overlap, records that pull. */
@Component({
  selector: 'tb-fit-diagnostics',
  imports: [TableBox],
  templateUrl: './fit-diagnostics.html',
  styleUrl: './fit-diagnostics.scss',
})
export class FitDiagnostics {
  readonly diagnostics = input.required<Diagnostics>();
  readonly unit = input.required<string>();
  readonly scaleUnit = input.required<string>();

  protected readonly share = formatShare;
  protected readonly quarters = computed(() =>
    this.diagnostics().coverage.map((quarter) => ({
      ...quarter,
      words: `${formatFigure(quarter.from, { significant: 3 })} to ${formatFigure(quarter.to, { significant: 3, unit: this.unit() })}`,
    })),
  );
  protected readonly inflation = computed(() =>
    [...this.diagnostics().inflation]
      .sort((left, right) => (right.factor ?? Infinity) - (left.factor ?? Infinity))
      .slice(0, LARGEST_SHOWN),
  );
  /** 30 and above: common practice after Belsley, Kuh and Welsch (1980), chapter 3. */
  protected readonly conditionIndices = computed(() =>
    [...this.diagnostics().conditionIndices]
      .sort((left, right) => (right ?? Infinity) - (left ?? Infinity))
      .slice(0, LARGEST_SHOWN)
      .map((index) => (index === null ? 'without bound' : formatFigure(index, { significant: 3 }))),
  );
  protected readonly sharedLoad = computed(() =>
    this.diagnostics().sharedLoad.map((group) => ({
      ...group,
      name: group.members.join(', '),
      rows: group.members.map((member, at) => ({
        member,
        weights: group.splits.map(({ weights }) => formatFigure(weights[at], { significant: 3 })),
      })),
    })),
  );
  protected readonly frequencies = computed(() =>
    [...this.diagnostics().frequencies].sort((left, right) => right.frequency - left.frequency),
  );
  protected readonly learning = computed(() =>
    this.diagnostics().learning.map(({ records, rmse }) => ({
      records: formatCount(records),
      error: formatFigure(rmse, { significant: 3, unit: this.unit() }),
    })),
  );
  protected readonly influential = computed(() =>
    this.diagnostics()
      .influential.slice(0, LARGEST_SHOWN)
      .map((record) => ({
        row: record.row + 1,
        distance: formatFigure(record.cooksDistance, { significant: 2 }),
        leverage: formatFigure(record.leverage, { significant: 2 }),
        residual: formatFigure(record.residual, { significant: 3, signed: true, unit: this.scaleUnit() }),
      })),
  );

  protected figure(value: number | null): string {
    return value === null ? 'without bound' : formatFigure(value, { significant: 3 });
  }
}
