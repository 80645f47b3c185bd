import { Component, ViewEncapsulation, computed, input } from '@angular/core';
import { BeamDiagram } from '@widget/beam-diagram/beam-diagram';
import { BeamTable, type CaseTexts } from '@widget/beam-diagram/beam-table';
import { intervalInWords } from '@widget/format/interval-words';
import { formatStepped } from '@widget/format/number-format';
import { precisionFor } from '@widget/format/precision';
import { unitInWords } from '@widget/format/unit-words';
import { IntervalBar } from '@widget/interval-bar/interval-bar';
import type { Evaluation } from '../../api/contract';

const LOCALE = 'en-GB';

/** One estimate: what moved it on the left, and its value, interval and figures on the right. */
@Component({
  selector: 'tb-case-result',
  imports: [BeamDiagram, BeamTable, IntervalBar],
  templateUrl: './case-result.html',
  // The beam's table is styled once for the program that shows it; its classes are its own.
  styleUrls: ['../../../../../widget/src/beam-diagram/beam-diagram.css', './case-result.scss'],
  encapsulation: ViewEncapsulation.None,
  host: { '[class.tb-case-on-log]': "evaluation().scale === 'log'" },
})
export class CaseResult {
  readonly evaluation = input.required<Evaluation>();
  readonly caseTexts = input.required<CaseTexts>();

  protected readonly locale = LOCALE;
  protected readonly measured = computed(() => {
    const { value, interval } = this.evaluation();
    return { value, low: interval.low, high: interval.high };
  });
  private readonly precision = computed(() => precisionFor(this.measured()));
  protected readonly value = computed(() => formatStepped(this.evaluation().value, this.precision().step, LOCALE));
  protected readonly unit = computed(() => unitInWords(this.evaluation().unit));
  protected readonly words = computed(() =>
    intervalInWords(this.evaluation().interval, {
      unit: this.evaluation().unit,
      precision: this.precision(),
      locale: LOCALE,
    }),
  );
}
