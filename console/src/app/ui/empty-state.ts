import { Component, input } from '@angular/core';

/** Says what belongs here; the projected content offers the next step. */
@Component({
  selector: 'tb-empty-state',
  template: `
    <h2 class="tb-section-title">{{ heading() }}</h2>
    <ng-content />
  `,
  styles: `
    :host {
      display: block;
      padding: var(--tb-space-6) var(--tb-space-5);
      border: 1px dashed var(--tb-outline);
      color: var(--tb-slate);
    }

    h2 {
      color: var(--tb-ink);
      margin-bottom: var(--tb-space-2);
    }
  `,
})
export class EmptyState {
  readonly heading = input.required<string>();
}
