import { Component, computed, input, linkedSignal } from '@angular/core';
import type { Finding } from '../../api/contract';
import { FINDING_WORDS, listedOf, rowsHidden, rowsOf } from './finding-words';

/** One finding: what was found, where, and what may be done about it. */
@Component({
  selector: 'tb-finding-entry',
  templateUrl: './finding-entry.html',
  styleUrl: './finding-entry.scss',
})
export class FindingEntry {
  readonly finding = input.required<Finding>();

  protected readonly all = linkedSignal({ source: () => this.finding(), computation: () => false });
  protected readonly kind = computed(() => FINDING_WORDS[this.finding().kind]);
  protected readonly columns = computed(() => this.finding().columns.join(', '));
  protected readonly listed = computed(() => listedOf(this.finding()));
  protected readonly rows = computed(() => rowsOf(this.finding(), this.all()));
  protected readonly hidden = computed(() => rowsHidden(this.finding()));

  protected toggle(): void {
    this.all.update((all) => !all);
  }
}
