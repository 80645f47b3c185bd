import { Component, input, output } from '@angular/core';
import type { Invited } from '../api/contract';
import { CopyText } from '../ui/copy-text';
import { FocusHere } from '../ui/focus-here';
import { MomentPipe } from '../ui/moment-pipes';

/** The one look at an invitation's link. */
@Component({
  selector: 'tb-invitation-link',
  imports: [CopyText, FocusHere, MomentPipe],
  template: `
    <section class="tb-panel tb-panel-body" aria-labelledby="invited">
      <h2 id="invited" class="tb-section-title" tabindex="-1" tbFocusHere>{{ invited().person.name }} is invited</h2>
      @if (invited().mailSent === false) {
        <p>The message to {{ invited().person.email }} could not be sent: pass the link on yourself.</p>
      } @else {
        <p>The link goes to {{ invited().person.email }} by mail, and stands here should the mail not arrive.</p>
      }
      <p>
        It is shown this once, and works once, until {{ invited().expiresAt | moment }}. Whoever opens it sets the
        password, so give it to nobody else.
      </p>
      <tb-copy-text label="The invitation’s link" [text]="invited().invitationUrl" />
      <button type="button" class="tb-plain-button" (click)="done.emit()">Done</button>
    </section>
  `,
  styles: `
    :host {
      display: block;
    }

    section {
      border-color: var(--tb-ink);
    }

    h2:focus {
      outline: none;
    }

    button {
      margin-top: var(--tb-space-4);
    }
  `,
})
export class InvitationLink {
  readonly invited = input.required<Invited>();
  readonly done = output();
}
