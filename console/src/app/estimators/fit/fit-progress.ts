import { Component, computed, input, output } from '@angular/core';
import type { FitState, Progress } from '../../api/contract';
import { formatCount } from '../../ui/figure';

const STAGES: Readonly<Record<string, string>> = {
  queued: 'Waiting for its turn',
  reading: 'Reading the records',
  moments: 'Adding up the records',
  path: 'Following the penalty path',
  validation: 'Estimating held-out records',
  diagnostics: 'Working out diagnostics',
};

/** How far a fit has come, with a way to stop it. */
@Component({
  selector: 'tb-fit-progress',
  template: `
    <p class="stage" role="status">
      {{ stage() }}
      @if (counted()) {
        <span class="tb-figures">&ngsp;· {{ counted() }}</span>
      }
    </p>
    <progress [attr.aria-label]="stage()" [attr.max]="total()" [attr.value]="done()"></progress>
    @if (mayCancel()) {
      <button type="button" class="tb-plain-button" [disabled]="cancelling()" (click)="cancelled.emit()">
        {{ cancelling() ? 'Cancelling…' : 'Cancel the fit' }}
      </button>
    }
  `,
  styleUrl: './fit-progress.scss',
})
export class FitProgress {
  readonly state = input.required<FitState>();
  readonly progress = input.required<Progress>();
  readonly mayCancel = input(false);
  readonly cancelling = input(false);
  readonly cancelled = output();

  protected readonly stage = computed(() => {
    const stage = this.state() === 'queued' ? 'queued' : this.progress().stage;
    return STAGES[stage] ?? stage;
  });
  protected readonly isCounted = computed(() => this.state() === 'running' && this.progress().total > 0);
  protected readonly counted = computed(() =>
    this.isCounted() ? `${formatCount(this.progress().done)} of ${formatCount(this.progress().total)}` : '',
  );
  /** Without a count the bar only shows that something goes on. */
  protected readonly total = computed(() => (this.isCounted() ? this.progress().total : null));
  protected readonly done = computed(() => (this.isCounted() ? this.progress().done : null));
}
