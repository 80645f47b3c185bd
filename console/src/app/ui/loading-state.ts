import { Component, input } from '@angular/core';

/** Shown while a screen's first answer is on its way; it appears after a moment, so that quick answers do not flash. */
@Component({
  selector: 'tb-loading-state',
  template: `
    <div class="line"></div>
    <p>{{ label() }}</p>
  `,
  styleUrl: './loading-state.scss',
  host: { role: 'status', 'aria-live': 'polite' },
})
export class LoadingState {
  /** What is being read, such as `Reading record sets`. */
  readonly label = input.required<string>();
}
