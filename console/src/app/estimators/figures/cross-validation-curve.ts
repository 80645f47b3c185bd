import { Component, computed, input } from '@angular/core';
import { crossValidationFrame, type CrossValidationPlot, type PenaltyAxis } from './cross-validation-plot';

/** The drawing of the cross-validation curve; its frame gives it a title and a table. */
@Component({
  selector: 'tb-cross-validation-curve',
  templateUrl: './cross-validation-curve.html',
  styleUrl: '../../ui/plots/plot.scss',
})
export class CrossValidationCurve {
  readonly plot = input.required<CrossValidationPlot>();
  readonly axis = input.required<PenaltyAxis>();
  readonly errorLabel = input.required<string>();
  readonly name = input.required<string>();
  readonly description = input.required<string>();

  protected readonly frame = crossValidationFrame;
  protected readonly box = `0 0 ${crossValidationFrame.width} ${crossValidationFrame.height}`;
  protected readonly floor = crossValidationFrame.height - crossValidationFrame.bottom;
  protected readonly end = crossValidationFrame.width - crossValidationFrame.right;
  protected readonly middle = (crossValidationFrame.left + crossValidationFrame.width - crossValidationFrame.right) / 2;
  protected readonly acrossLabel = computed(() =>
    this.axis() === 'log-lambda'
      ? 'log₁₀ of the penalty λ (stronger to the right)'
      : 'effective degrees of freedom (stronger penalty to the left)',
  );
}
