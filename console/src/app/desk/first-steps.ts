import { Component, inject } from '@angular/core';
import { RouterLink } from '@angular/router';
import { SessionStore } from '../api/session-store';
import { EmptyState } from '../ui/empty-state';

/** The empty desk: the way to the first estimate. */
@Component({
  selector: 'tb-first-steps',
  imports: [EmptyState, RouterLink],
  template: `
    <tb-empty-state heading="Nothing is in force yet">
      <p>
        An estimate needs a formula that was fitted to records and approved by a second person. Records come first, then
        an estimator with a fit, then an edition that a reviewer puts in force.
      </p>
      @if (session.holds('analyst')) {
        <a class="tb-button" routerLink="/records/bring-in">Bring in records</a>
      }
    </tb-empty-state>
  `,
})
export class FirstSteps {
  protected readonly session = inject(SessionStore);
}
