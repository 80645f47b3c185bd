import { Component, computed, input, output } from '@angular/core';
import { formatCount } from './figure';

/** Lists are cut here. */
export const ROWS_A_PAGE = 25;

/** Moves through a list a page at a time; shows nothing while one page holds it all. */
@Component({
  selector: 'tb-pager',
  templateUrl: './pager.html',
  styleUrl: './pager.scss',
})
export class Pager {
  readonly total = input.required<number>();
  readonly offset = input.required<number>();
  readonly limit = input(ROWS_A_PAGE);
  /** What is listed, such as `rows`. */
  readonly noun = input('rows');
  readonly moved = output<number>();

  protected readonly needed = computed(() => this.total() > this.limit());
  protected readonly hasPrevious = computed(() => this.offset() > 0);
  protected readonly hasNext = computed(() => this.offset() + this.limit() < this.total());
  protected readonly range = computed(() => {
    const last = Math.min(this.offset() + this.limit(), this.total());
    return `${formatCount(this.offset() + 1)} to ${formatCount(last)} of ${formatCount(this.total())} ${this.noun()}`;
  });

  protected first(): void {
    this.moved.emit(0);
  }

  protected previous(): void {
    this.moved.emit(Math.max(0, this.offset() - this.limit()));
  }

  protected next(): void {
    if (this.hasNext()) this.moved.emit(this.offset() + this.limit());
  }

  protected last(): void {
    this.moved.emit(Math.floor((this.total() - 1) / this.limit()) * this.limit());
  }
}
