import { Component, computed, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RevisionSummary } from '../../api/contract';
import { countOf, formatCount } from '../../ui/figure';

/** Row numbers that stand before the rest is left to the link. */
const NUMBERS_SHOWN = 20;

/** Rows that only one of the two revisions has, by their number there. */
@Component({
  selector: 'tb-rows-on-one-side',
  imports: [RouterLink],
  template: `
    @if (total() === 0) {
      <p>None.</p>
    } @else {
      <p>{{ told() }}</p>
      <p>
        @for (number of shown(); track number) {
          <a [routerLink]="path()" [queryParams]="{ numbers: number }" fragment="rows"
            ><span class="tb-only-read">Row </span>{{ number }}</a
          >{{ $last ? '' : ', ' }}
        }
        @if (numbers().length > shown().length) {
          and others
        }
      </p>
      <a class="tb-plain-button" [routerLink]="path()" [queryParams]="{ numbers: all() }" fragment="rows">{{
        showWords()
      }}</a>
    }
  `,
})
export class RowsOnOneSide {
  readonly revision = input.required<RevisionSummary>();
  /** The first hundred at most. */
  readonly numbers = input.required<readonly number[]>();
  readonly total = input.required<number>();

  protected readonly path = computed(() => ['/records/revisions', this.revision().id]);
  protected readonly shown = computed(() => this.numbers().slice(0, NUMBERS_SHOWN));
  protected readonly all = computed(() => this.numbers().join(','));
  protected readonly told = computed(
    () => `${countOf(this.total(), 'row')} of revision ${this.revision().number} only. By number there:`,
  );
  protected readonly showWords = computed(() => {
    const count = this.numbers().length;
    const which = count < this.total() ? `the first ${formatCount(count)} rows` : countOf(count, 'row');
    return `Show ${which} in revision ${this.revision().number}`;
  });
}
