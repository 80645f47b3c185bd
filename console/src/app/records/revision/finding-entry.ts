import { Component, computed, input, linkedSignal, output, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { Finding } from '../../api/contract';
import { FocusHere } from '../../ui/focus-here';
import { wordsOfStep } from '../mending/step-words';
import { FINDING_WORDS, listedOf, rowsAddressOf, rowsHidden, rowsOf } from './finding-words';

/** One finding: what was found, where, and what may be done about it. */
@Component({
  selector: 'tb-finding-entry',
  imports: [FocusHere, RouterLink],
  templateUrl: './finding-entry.html',
  styleUrl: './finding-entry.scss',
})
export class FindingEntry {
  readonly finding = input.required<Finding>();
  /** Whether its steps can be added to the mending by whoever looks. */
  readonly addable = input(false);
  /** Whether they wait there already. */
  readonly added = input(false);
  readonly adding = input(false);
  readonly add = output();

  protected readonly all = linkedSignal({ source: () => this.finding(), computation: () => false });
  protected readonly kind = computed(() => FINDING_WORDS[this.finding().kind]);
  protected readonly columns = computed(() => this.finding().columns.join(', '));
  protected readonly listed = computed(() => listedOf(this.finding()));
  protected readonly rows = computed(() => rowsOf(this.finding(), this.all()));
  protected readonly hidden = computed(() => rowsHidden(this.finding()));
  protected readonly rowsAddress = computed(() => rowsAddressOf(this.finding()));
  protected readonly steps = computed(() => this.finding().steps.map(wordsOfStep));

  /** Whether the words that take the button's place take its focus too. */
  protected readonly pressed = signal(false);

  protected press(): void {
    this.pressed.set(true);
    this.add.emit();
  }

  protected toggle(): void {
    this.all.update((all) => !all);
  }
}
