import { Component, computed, inject, input } from '@angular/core';
import { BeamDiagram } from '@widget/beam-diagram/beam-diagram';
import { EditionsClient } from '../api/editions-client';
import { EstimatesClient } from '../api/estimates-client';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { MomentPipe } from '../ui/moment-pipes';
import { PageHead } from '../ui/page-head';
import { ProblemNotice } from '../ui/problem-notice';
import { ReferenceSearch } from '../ui/reference-search';
import { Sheet } from '../ui/sheet/sheet';
import { SheetSection } from '../ui/sheet/sheet-section';
import { caseRows } from './case-rows';
import { EstimateFigure } from './estimate-figure';
import { EstimateOrigin } from './estimate-origin';

/** Where a number came from: what was answered, what moved it, and everything needed to answer for it. */
@Component({
  selector: 'tb-estimate-page',
  imports: [
    BeamDiagram,
    EstimateFigure,
    EstimateOrigin,
    LoadingState,
    MomentPipe,
    PageHead,
    ProblemNotice,
    ReferenceSearch,
    Sheet,
    SheetSection,
  ],
  templateUrl: './estimate-page.html',
  styleUrl: './estimate-page.scss',
})
export class EstimatePage {
  private readonly estimates = inject(EstimatesClient);
  private readonly editions = inject(EditionsClient);

  readonly id = input.required<string>();

  protected readonly estimate = load(() => this.estimates.read(this.id()));
  /** For units and labels of the inputs; where it cannot be read, the case is shown under the inputs' own names. */
  private readonly edition = load(() => {
    const record = this.estimate.value();
    return record && this.editions.read(record.editionId);
  });
  protected readonly rows = computed(() => {
    const record = this.estimate.value();
    return record ? caseRows(record, this.edition.value()?.inputSchema) : [];
  });
  protected readonly caseTexts = computed(() =>
    Object.fromEntries(this.rows().map(({ input, text }) => [input, text])),
  );
  protected readonly notFound = computed(() => this.estimate.problem()?.status === 404);
}
