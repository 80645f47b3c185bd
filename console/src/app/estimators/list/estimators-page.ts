import { Component, computed, inject, signal } from '@angular/core';
import { MatSortModule } from '@angular/material/sort';
import { Router, RouterLink } from '@angular/router';
import type { Estimator } from '../../api/contract';
import { EstimatorsClient } from '../../api/estimators-client';
import { everyItem } from '../../api/page';
import { SessionStore } from '../../api/session-store';
import { Announcer } from '../../ui/announcer';
import { EmptyState } from '../../ui/empty-state';
import { formatFigure } from '../../ui/figure';
import { CountPipe } from '../../ui/figure-pipes';
import { listView } from '../../ui/list-view';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { PageHead } from '../../ui/page-head';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { StatusStamp, type Stamp } from '../../ui/status-stamp';
import { TableBox } from '../../ui/table-box';
import { TextField } from '../fields/text-field';
import { editionStamp } from '../words/edition-stamp';
import { EstimatorForm } from './estimator-form';

/** Every estimator of the desk, and naming a new one. */
@Component({
  selector: 'tb-estimators-page',
  imports: [
    CountPipe,
    EmptyState,
    EstimatorForm,
    LoadingState,
    MatSortModule,
    PageHead,
    Pager,
    ProblemNotice,
    RouterLink,
    StatusStamp,
    TableBox,
    TextField,
  ],
  templateUrl: './estimators-page.html',
  styleUrl: './estimators-page.scss',
})
export class EstimatorsPage {
  private readonly client = inject(EstimatorsClient);
  private readonly router = inject(Router);
  private readonly announcer = inject(Announcer);
  private readonly session = inject(SessionStore);

  protected readonly estimators = load(() => everyItem((page) => this.client.list(page)));
  protected readonly all = computed(() => this.estimators.value() ?? []);
  protected readonly view = listView<Estimator>(this.all, {
    firstSort: { active: 'name', direction: 'asc' },
    sortKeys: {
      name: ({ name }) => name,
      inForceAt: ({ inForce }) => inForce?.inForceAt,
      fitCount: ({ fitCount }) => fitCount,
      estimateCount: ({ estimateCount }) => estimateCount,
    },
    words: ({ name, slug, targetName }) => `${name} ${slug} ${targetName}`,
  });
  protected readonly findable = computed(() => this.all().length > ROWS_A_PAGE);
  protected readonly mayName = computed(() => this.session.holds('analyst'));
  protected readonly naming = signal(false);

  protected target({ targetName, unit }: Estimator): string {
    return unit ? `${targetName}, ${unit}` : targetName;
  }

  protected stamp({ inForce }: Estimator): Stamp | undefined {
    return inForce ? editionStamp(inForce) : undefined;
  }

  protected heldOut({ inForce, unit }: Estimator): string {
    return formatFigure(inForce?.rmse, { significant: 2, unit });
  }

  protected named(estimator: Estimator): void {
    this.announcer.say(`${estimator.name} is named`);
    void this.router.navigate(['/estimators', estimator.slug]);
  }
}
