import { Component, computed, inject, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { FitSummary } from '../../api/contract';
import { FitsClient } from '../../api/fits-client';
import { formatFigure } from '../../ui/figure';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { MomentPipe } from '../../ui/moment-pipes';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { FIT_STAMPS } from '../../ui/stamps';
import { StatusStamp } from '../../ui/status-stamp';
import { TableBox } from '../../ui/table-box';
import { methodName, ruleName } from '../words/method-words';

/** Candidates that were fitted, newest first. */
@Component({
  selector: 'tb-fits-section',
  imports: [LoadingState, MomentPipe, Pager, ProblemNotice, RouterLink, StatusStamp, TableBox],
  templateUrl: './fits-section.html',
  styles: `
    .name {
      white-space: nowrap;
    }
  `,
})
export class FitsSection {
  private readonly client = inject(FitsClient);

  readonly slug = input.required<string>();
  readonly unit = input.required<string>();

  protected readonly offset = signal(0);
  protected readonly limit = ROWS_A_PAGE;
  protected readonly fits = load(() => this.client.list(this.slug(), { limit: ROWS_A_PAGE, offset: this.offset() }));
  protected readonly rows = computed(() =>
    (this.fits.value()?.items ?? []).map((fit) => ({ ...fit, ...this.words(fit) })),
  );
  protected readonly stamps = FIT_STAMPS;

  private words(fit: FitSummary): { readonly how: string; readonly error: string; readonly degrees: string } {
    const rule = fit.method === 'least-squares' ? '' : `, ${ruleName(fit.rule).toLowerCase()}`;
    return {
      how: methodName(fit.method) + rule,
      error: formatFigure(fit.rmse, { significant: 3, unit: this.unit() }),
      degrees: formatFigure(fit.effectiveDegreesOfFreedom, { significant: 3 }),
    };
  }
}
