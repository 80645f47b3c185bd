import { Component, DestroyRef, computed, effect, inject } from '@angular/core';
import { DeskClient } from '../api/desk-client';
import { SessionStore } from '../api/session-store';
import { CountPipe } from '../ui/figure-pipes';
import { load } from '../ui/load';
import { LoadingState } from '../ui/loading-state';
import { ProblemNotice } from '../ui/problem-notice';
import { PageHead } from '../ui/page-head';
import { FirstSteps } from './first-steps';
import { FitsUnderWay } from './fits-under-way';
import { InForce } from './in-force';
import { Lately } from './lately';
import { UnderReview } from './under-review';

/** Often enough to watch a fit, seldom enough to leave open all day. */
const REFRESH_MS = 5000;

/** What waits, what is in force, what is under way: the first page of the day. */
@Component({
  selector: 'tb-desk-page',
  imports: [CountPipe, FirstSteps, FitsUnderWay, InForce, Lately, LoadingState, PageHead, ProblemNotice, UnderReview],
  templateUrl: './desk-page.html',
  styleUrl: './desk-page.scss',
})
export class DeskPage {
  private readonly client = inject(DeskClient);
  protected readonly session = inject(SessionStore);

  protected readonly overview = load(() => this.client.read());
  protected readonly nothingYet = computed(() => {
    const overview = this.overview.value();
    if (!overview) return false;
    const { underReview, inForce, fitsUnderWay } = overview;
    return underReview.length + inForce.length + fitsUnderWay.length === 0;
  });
  private readonly anyUnderWay = computed(() => (this.overview.value()?.fitsUnderWay.length ?? 0) > 0);

  constructor() {
    this.refreshWhileFitsRun();
  }

  private refreshWhileFitsRun(): void {
    let ticking: ReturnType<typeof setInterval> | undefined;
    effect(() => {
      clearInterval(ticking);
      if (this.anyUnderWay()) ticking = setInterval(() => this.refreshIfSeen(), REFRESH_MS);
    });
    inject(DestroyRef).onDestroy(() => clearInterval(ticking));
  }

  private refreshIfSeen(): void {
    if (document.visibilityState === 'visible') this.overview.reload();
  }
}
