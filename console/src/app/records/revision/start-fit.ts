import { Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { EstimatorsClient } from '../../api/estimators-client';
import { everyItem } from '../../api/page';
import { EmptyState } from '../../ui/empty-state';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { ProblemNotice } from '../../ui/problem-notice';

/** A fit belongs to an estimator: asks which, and takes the records along. */
@Component({
  selector: 'tb-start-fit',
  imports: [EmptyState, LoadingState, ProblemNotice, RouterLink],
  templateUrl: './start-fit.html',
  styleUrl: './start-fit.scss',
})
export class StartFit {
  private readonly client = inject(EstimatorsClient);

  readonly revisionId = input.required<string>();
  readonly recordSetId = input.required<string>();

  protected readonly estimators = load(() => everyItem((page) => this.client.list(page)));
}
