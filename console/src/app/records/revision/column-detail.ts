import { Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RecordColumn } from '../../api/contract';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { ColumnFact, binsOf, factsOf, levelsOf, outlyingRowsOf, quantilesOf } from './column-facts';
import { ColumnShape } from './column-shape';
import { outlyingWords, unreadableWords } from './column-words';

/** One column's figures in full, each leading to the rows behind it. */
@Component({
  selector: 'tb-column-detail',
  imports: [ColumnShape, FigureFrame, PlotTableTemplate, PlotTemplate, RouterLink],
  templateUrl: './column-detail.html',
  styleUrl: './column-detail.scss',
})
export class ColumnDetail {
  readonly column = input.required<RecordColumn>();
  readonly rowCount = input.required<number>();
  /** Cells of the file that did not fit the column's kind. */
  readonly unreadable = input(0);
  /** Whether there are rows that figures can lead to. */
  readonly linked = input(true);

  protected readonly facts = computed(() => this.asLinked(this.knownFacts()));
  protected readonly unreadableTold = computed(() =>
    this.unreadable() > 0 ? unreadableWords(this.unreadable(), this.column().kind) : undefined,
  );
  protected readonly outlying = computed(() => {
    const { outlying } = this.column();
    return (
      outlying && {
        words: outlyingWords(outlying, this.column()),
        where: this.linked() ? outlyingRowsOf(this.column()) : undefined,
      }
    );
  });
  protected readonly quantiles = computed(() => this.asLinked(quantilesOf(this.column())));
  protected readonly caption = computed(() =>
    this.column().quantiles?.some(({ share }) => share === 0.01)
      ? 'Rows in each stretch of the range; the area of a bar is its share. The line above runs from 1% to 99% of the readings, the box holds the middle half, and the thick mark is the median.'
      : 'Rows in each stretch of the range; the area of a bar is its share.',
  );
  protected readonly bins = computed(() => this.asLinked(binsOf(this.column())));
  protected readonly levels = computed(() => this.asLinked(levelsOf(this.column(), this.rowCount())));

  private knownFacts(): readonly ColumnFact[] {
    const facts = factsOf(this.column(), this.rowCount());
    return this.linked() ? facts : facts.filter(({ name }) => name !== 'Distinct values');
  }

  private asLinked<Fact extends { readonly where?: string }>(facts: readonly Fact[]): readonly Fact[] {
    return this.linked() ? facts : facts.map((fact) => ({ ...fact, where: undefined }));
  }
}
