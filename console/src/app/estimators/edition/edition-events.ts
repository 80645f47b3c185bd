import { Component, computed, input } from '@angular/core';
import type { Edition } from '../../api/contract';
import { MomentPipe } from '../../ui/moment-pipes';
import { EDITION_STAMPS } from '../../ui/stamps';
import { StatusStamp } from '../../ui/status-stamp';
import { TableBox } from '../../ui/table-box';

/** Who did what to an edition, and when; newest first. */
@Component({
  selector: 'tb-edition-events',
  imports: [MomentPipe, StatusStamp, TableBox],
  template: `
    <tb-table-box label="Events">
      <table class="tb-table">
        <caption class="tb-only-read">
          Who did what
        </caption>
        <thead>
          <tr>
            <th scope="col">When</th>
            <th scope="col">Became</th>
            <th scope="col">By</th>
            <th scope="col">Note</th>
          </tr>
        </thead>
        <tbody>
          @for (event of newestFirst(); track $index) {
            <tr>
              <td class="when">{{ event.at | moment }}</td>
              <td><tb-status-stamp [stamp]="stamps[event.state]" /></td>
              <td>{{ event.by.name }}</td>
              <td class="note">{{ event.note }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
  `,
  styles: `
    .when {
      white-space: nowrap;
    }

    .note {
      min-width: 12rem;
      white-space: pre-line;
    }
  `,
})
export class EditionEvents {
  readonly events = input.required<Edition['events']>();

  protected readonly stamps = EDITION_STAMPS;
  protected readonly newestFirst = computed(() => [...this.events()].reverse());
}
