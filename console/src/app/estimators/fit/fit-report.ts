import { Component, computed, input } from '@angular/core';
import type { FitResult } from '../../api/contract';
import { formatCount, formatFigure } from '../../ui/figure';

/** Which way the numbers were found, and how well that went. */
@Component({
  selector: 'tb-fit-report',
  template: `
    <dl class="tb-facts">
      <dt>Route</dt>
      <dd>{{ report().route }}</dd>
      <dt>Iterations</dt>
      <dd>{{ report().iterations === 0 ? 'none: solved directly' : iterations() }}</dd>
      <dt>Converged</dt>
      <dd>{{ report().converged ? 'yes' : 'no: read the figures with care' }}</dd>
      <dt>Gap to the best possible</dt>
      <dd>{{ gap() }}</dd>
      <dt>Condition number</dt>
      <dd>{{ condition() }}</dd>
    </dl>
    @if (report().warnings.length > 0) {
      <ul class="warnings" aria-label="Warnings">
        @for (warning of report().warnings; track $index) {
          <li>{{ warning }}</li>
        }
      </ul>
    }
  `,
  styles: `
    .warnings {
      margin: var(--tb-space-4) 0 0;
      padding: var(--tb-space-3) var(--tb-space-4) var(--tb-space-3) var(--tb-space-5);
      border-left: 3px solid var(--tb-ochre);
      background: var(--tb-ochre-wash);
    }
  `,
})
export class FitReport {
  readonly report = input.required<FitResult['report']>();

  protected readonly iterations = computed(() => formatCount(this.report().iterations));
  protected readonly gap = computed(() =>
    this.report().gap === 0 ? '0: solved exactly' : formatFigure(this.report().gap, { significant: 2 }),
  );
  protected readonly condition = computed(() => formatFigure(this.report().conditionNumber, { significant: 3 }));
}
