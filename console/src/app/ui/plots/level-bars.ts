import { Component, computed, input } from '@angular/core';
import { countOf, formatShare } from '../figure';

export interface Level {
  readonly value: string;
  readonly count: number;
}

const SHOWN = 3;

/** The commonest levels of a category as one divided bar, with their names and shares in words. */
@Component({
  selector: 'tb-level-bars',
  templateUrl: './level-bars.html',
  styleUrl: './level-bars.scss',
})
export class LevelBars {
  readonly levels = input.required<readonly Level[]>();
  /** All rows that have a value, also those of levels not listed. */
  readonly total = input.required<number>();

  protected readonly parts = computed(() =>
    this.levels().map(({ count }) => ({ percent: this.total() === 0 ? 0 : (100 * count) / this.total() })),
  );
  protected readonly words = computed(() => {
    const shown = this.levels().slice(0, SHOWN);
    const named = shown.map(({ value, count }) => `${value} ${formatShare(count / Math.max(1, this.total()))}`);
    const others = this.levels().length - shown.length;
    return others > 0 ? `${named.join(', ')} and ${countOf(others, 'other')}` : named.join(', ');
  });
}
