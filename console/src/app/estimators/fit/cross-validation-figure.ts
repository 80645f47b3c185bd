import { Component, computed, input, signal } from '@angular/core';
import type { FitResult } from '../../api/contract';
import { formatFigure } from '../../ui/figure';
import { FigureFrame, PlotTableTemplate, PlotTemplate } from '../../ui/plots/figure-frame';
import { TableBox } from '../../ui/table-box';
import { CrossValidationCurve } from '../figures/cross-validation-curve';
import { crossValidationPlot, type PenaltyAxis } from '../figures/cross-validation-plot';

/** Held-out error along the penalty path, as a drawing or a table. */
@Component({
  selector: 'tb-cross-validation-figure',
  imports: [CrossValidationCurve, FigureFrame, PlotTableTemplate, PlotTemplate, TableBox],
  templateUrl: './cross-validation-figure.html',
  styleUrl: './figures.scss',
})
export class CrossValidationFigure {
  readonly result = input.required<FitResult>();
  readonly scaleUnit = input.required<string>();
  readonly onLog = input.required<boolean>();

  protected readonly axis = signal<PenaltyAxis>('log-lambda');
  protected readonly plot = computed(() => crossValidationPlot(this.result(), this.axis()));
  protected readonly errorLabel = computed(() => {
    const where = this.onLog() ? 'on the log scale' : this.scaleUnit();
    return `root mean squared held-out error${where ? `, ${where}` : ''}`;
  });
  protected readonly caption = computed(() => {
    const { penalty } = this.result();
    const chosen = `Chosen: λ ${formatFigure(penalty.lambda, { significant: 3 })}, ${formatFigure(penalty.effectiveDegreesOfFreedom, { significant: 3 })} effective degrees of freedom.`;
    return `${chosen} The band is one standard error to each side.`;
  });
  protected readonly rows = computed(() =>
    this.result().path.map((point) => ({
      lambda: formatFigure(point.lambda, { significant: 3 }),
      degrees: formatFigure(point.effectiveDegreesOfFreedom, { significant: 3 }),
      error: formatFigure(point.cvError === null ? null : Math.sqrt(point.cvError), { significant: 4 }),
      squared: formatFigure(point.cvError, { significant: 4 }),
      spread: formatFigure(point.cvStandardError, { significant: 2 }),
      marks: this.marksAt(point.lambda),
    })),
  );

  private marksAt(lambda: number): string {
    const { penalty } = this.result();
    return [
      lambda === penalty.lambda ? 'chosen' : '',
      lambda === penalty.minimumLambda ? 'minimum' : '',
      lambda === penalty.oneStandardErrorLambda ? 'one standard error' : '',
    ]
      .filter(Boolean)
      .join(', ');
  }
}
