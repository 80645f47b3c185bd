import { Component, computed, input } from '@angular/core';
import { asSentence, intervalInWords } from '@widget/format/interval-words';
import { formatStepped, withUnit } from '@widget/format/number-format';
import { precisionFor } from '@widget/format/precision';
import { unitInWords } from '@widget/format/unit-words';
import { IntervalBar } from '@widget/interval-bar/interval-bar';
import type { EstimateRecord } from '../api/contract';

const LOCALE = 'en-GB';

/** The number as it was answered, with its interval in words and as a bar, and the flags that came with it. */
@Component({
  selector: 'tb-estimate-figure',
  imports: [IntervalBar],
  templateUrl: './estimate-figure.html',
  styleUrl: './estimate-figure.scss',
})
export class EstimateFigure {
  readonly estimate = input.required<EstimateRecord>();

  protected readonly locale = LOCALE;
  protected readonly measured = computed(() => {
    const { value, interval } = this.estimate();
    return { value, low: interval.low, high: interval.high };
  });
  private readonly precision = computed(() => precisionFor(this.measured()));
  protected readonly value = computed(() => formatStepped(this.estimate().value, this.precision().step, LOCALE));
  protected readonly unit = computed(() => unitInWords(this.estimate().unit));
  protected readonly words = computed(() => {
    const { interval, unit } = this.estimate();
    return asSentence(intervalInWords(interval, { unit, precision: this.precision(), locale: LOCALE }));
  });
  protected readonly typical = computed(() => {
    const { typical, unit } = this.estimate();
    return withUnit(formatStepped(typical, this.precision().step, LOCALE), unit);
  });
}
