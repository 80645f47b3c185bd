import { Component, input, output, signal } from '@angular/core';
import type { Estimator } from '../../api/contract';
import { EstimatorForm } from '../list/estimator-form';

/** What an estimator says of itself, to partners and in the fit sheet. */
@Component({
  selector: 'tb-words-section',
  imports: [EstimatorForm],
  templateUrl: './words-section.html',
  styleUrl: './words-section.scss',
})
export class WordsSection {
  readonly estimator = input.required<Estimator>();
  readonly mayChange = input(false);
  readonly changed = output<Estimator>();

  protected readonly editing = signal(false);

  protected keep(estimator: Estimator): void {
    this.editing.set(false);
    this.changed.emit(estimator);
  }
}
