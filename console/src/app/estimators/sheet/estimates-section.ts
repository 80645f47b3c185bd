import { Component, computed, inject, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import { formatStepped } from '@widget/format/number-format';
import { precisionFor } from '@widget/format/precision';
import type { EstimateSummary } from '../../api/contract';
import { EstimatesClient } from '../../api/estimates-client';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { MomentPipe } from '../../ui/moment-pipes';
import { Pager } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { TableBox } from '../../ui/table-box';

const ESTIMATES_A_PAGE = 10;
const LOCALE = 'en-GB';

/** The newest answers that partners were given. */
@Component({
  selector: 'tb-estimates-section',
  imports: [LoadingState, MomentPipe, Pager, ProblemNotice, RouterLink, TableBox],
  templateUrl: './estimates-section.html',
  styles: `
    .name {
      white-space: nowrap;
    }
  `,
})
export class EstimatesSection {
  private readonly client = inject(EstimatesClient);

  readonly slug = input.required<string>();
  readonly unit = input.required<string>();

  protected readonly limit = ESTIMATES_A_PAGE;
  protected readonly offset = signal(0);
  protected readonly estimates = load(() =>
    this.client.list(this.slug(), { limit: ESTIMATES_A_PAGE, offset: this.offset() }),
  );
  protected readonly rows = computed(() =>
    (this.estimates.value()?.items ?? []).map((estimate) => ({ ...estimate, ...figuresOf(estimate) })),
  );
}

/** Value and interval with the digits that the interval earns. */
export function figuresOf({ value, low, high }: EstimateSummary): {
  readonly figure: string;
  readonly between: string;
} {
  const precision = precisionFor({ value, low, high });
  const end = (figure: number): string => formatStepped(figure, precision.endStep, LOCALE);
  return {
    figure: formatStepped(value, precision.step, LOCALE),
    between: low !== null && high !== null ? `${end(low)} to ${end(high)}` : openInterval(low, high, end),
  };
}

function openInterval(low: number | null, high: number | null, end: (figure: number) => string): string {
  if (low !== null) return `${end(low)} or more`;
  return high === null ? 'not bounded' : `${end(high)} or less`;
}
