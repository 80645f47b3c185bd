import { Component, computed, input } from '@angular/core';
import type { FitResult } from '../../api/contract';
import { formatFigure, formatShare } from '../../ui/figure';

/** How far off the formula was for records that it had not seen. */
@Component({
  selector: 'tb-fit-accuracy',
  template: `
    <dl class="tb-facts">
      <dt>Root mean squared error</dt>
      <dd>
        <strong>{{ error() }}</strong>
        @if (spread()) {
          <span class="tb-small">, ± {{ spread() }} standard error</span>
        }
      </dd>
      @if (nested()) {
        <dt>With the penalty chosen anew in every fold</dt>
        <dd>{{ nested() }}</dd>
      }
      <dt>Mean absolute error</dt>
      <dd>{{ meanAbsolute() }}</dd>
      <dt>Share of the spread explained (R²)</dt>
      <dd>{{ explained() }}</dd>
      <dt>Records inside their interval</dt>
      <dd>
        {{ coverage() }} <span class="tb-small">where {{ wanted() }} were to be</span>
      </dd>
    </dl>
  `,
})
export class FitAccuracy {
  readonly result = input.required<FitResult>();
  readonly unit = input.required<string>();
  readonly onLog = input.required<boolean>();
  readonly level = input(0.9);

  private readonly accuracy = computed(() => this.result().accuracy);
  protected readonly error = computed(() => formatFigure(this.accuracy().rmse, { significant: 3, unit: this.unit() }));
  protected readonly nested = computed(() => {
    const { nestedRmse } = this.accuracy();
    if (nestedRmse === undefined) return '';
    return this.onLog()
      ? `${formatFigure(nestedRmse, { significant: 3 })} on the log scale`
      : formatFigure(nestedRmse, { significant: 3, unit: this.unit() });
  });
  protected readonly meanAbsolute = computed(() =>
    formatFigure(this.accuracy().mae, { significant: 3, unit: this.unit() }),
  );
  protected readonly explained = computed(() => formatFigure(this.accuracy().r2, { significant: 3 }));
  protected readonly wanted = computed(() => formatShare(this.level()));
  protected readonly coverage = computed(() => {
    const { coverage } = this.accuracy();
    return coverage === null ? '–' : formatShare(coverage);
  });
  /** The standard error is that of the mean squared error on the scale the model adds on; its root's is se ÷ (2 · root). */
  protected readonly spread = computed(() => {
    const { standardErrorOfCv, rmse } = this.accuracy();
    if (this.onLog() || standardErrorOfCv === null || !(rmse > 0)) return '';
    return formatFigure(standardErrorOfCv / (2 * rmse), { significant: 2, unit: this.unit() });
  });
}
