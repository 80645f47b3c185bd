import { Component, computed, input, output } from '@angular/core';
import type { Problem } from '../api/problem';
import { formatWait } from './moment';

/** What went wrong and what to do; with a button where trying again can help. */
@Component({
  selector: 'tb-problem-notice',
  templateUrl: './problem-notice.html',
  styleUrl: './problem-notice.scss',
  host: { role: 'alert' },
})
export class ProblemNotice {
  readonly problem = input.required<Problem>();
  /** Where trying again makes no sense (a form that must be changed first), leave it off. */
  readonly retryLabel = input('Try again');
  readonly canRetry = input(true);
  readonly retry = output();

  protected readonly wait = computed(() => {
    const { retryAfter, detail } = this.problem();
    // The service often says it itself.
    if (retryAfter === undefined || detail.includes(String(retryAfter))) return undefined;
    return formatWait(retryAfter);
  });
}
