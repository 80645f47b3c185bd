import { ChangeDetectionStrategy, Component, computed, input, ViewEncapsulation } from '@angular/core';
import { wordsFor } from './beam-words';
import { BeamEvaluation, labelOf, sumOf } from './contribution';

/** What the case gave for each input, as it is to be shown ("9.8 t"), by the input's name. */
export type CaseTexts = Readonly<Record<string, string>>;

/** The figures of the beam as a table; every input has its row, also those too many to be drawn. */
@Component({
  selector: 'tb-beam-table',
  templateUrl: './beam-table.html',
  encapsulation: ViewEncapsulation.None,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BeamTable {
  readonly evaluation = input.required<BeamEvaluation>();
  readonly caseTexts = input<CaseTexts | null>(null);
  readonly locale = input<string>();

  protected readonly onLog = computed(() => this.evaluation().scale === 'log');
  protected readonly words = computed(() => wordsFor(this.evaluation(), this.locale()));
  protected readonly sum = computed(() => sumOf(this.evaluation().contributions));
  /** The unit stands once in the heading, so that the columns stay narrow; a factor has none. */
  protected readonly movesHeading = computed(() => {
    const { unit } = this.evaluation();
    return this.onLog() || unit === '' ? 'Moves by' : `Moves by, ${unit}`;
  });
  protected readonly rows = computed(() =>
    [...this.evaluation().contributions]
      .sort((a, b) => Math.abs(b.contribution) - Math.abs(a.contribution) || b.mass - a.mass)
      .map((contribution) => ({
        ...contribution,
        label: labelOf(contribution),
        text: this.caseTexts()?.[contribution.input] ?? '–',
      })),
  );

  protected total(value: number): string {
    return this.onLog() ? this.words().amount(value) : this.words().bareAmount(value);
  }
}
