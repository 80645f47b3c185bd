import { Component, computed, inject, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RecordSetDetail } from '../../api/contract';
import type { Problem } from '../../api/problem';
import { RecordsClient } from '../../api/records-client';
import { load } from '../../ui/load';
import { formatMoment } from '../../ui/moment';

/** Somebody has added to the set since it was read: says who added what, and lets the person go on or look first. */
@Component({
  selector: 'tb-set-changed',
  imports: [RouterLink],
  template: `
    <div class="notice" role="alert">
      <h2>The record set has changed</h2>
      @if (set.value(); as set) {
        <p>{{ words() }} Your steps are kept, and nothing was made of them yet.</p>
        <div class="tb-actions">
          <button type="button" class="tb-plain-button" (click)="goOn.emit(set)">
            Make it all the same, as revision {{ set.lastNumber + 1 }}
          </button>
          <a [routerLink]="['/records/revisions', set.revision.id]">Look at revision {{ set.revision.number }} first</a>
        </div>
      } @else {
        <p>{{ problem().detail }}</p>
        @if (set.problem()) {
          <button type="button" class="tb-plain-button" (click)="set.reload()">Read the record set again</button>
        }
      }
    </div>
  `,
  styles: `
    .notice {
      padding: var(--tb-space-4) var(--tb-space-5);
      border: 1px solid var(--tb-ochre);
      border-left-width: 4px;
      background: var(--tb-sheet);
    }

    h2 {
      margin-bottom: var(--tb-space-1);
      font: var(--tb-type-section);
    }
  `,
})
export class SetChanged {
  private readonly records = inject(RecordsClient);

  /** The refusal. */
  readonly problem = input.required<Problem>();
  readonly recordSetId = input.required<string>();
  /** The newest revision that the person knew of. */
  readonly knownNumber = input.required<number>();
  readonly goOn = output<RecordSetDetail>();

  protected readonly set = load(() => {
    this.problem(); // Another refusal is about another newest revision.
    return this.records.read(this.recordSetId());
  });
  protected readonly words = computed(() => {
    const newest = this.set.value()?.revision;
    if (!newest) return '';
    if (newest.number < this.knownNumber())
      return `Revision ${this.knownNumber()} has been deleted; revision ${newest.number} is the newest now.`;
    return `${newest.createdBy.name} added revision ${newest.number} on ${formatMoment(newest.createdAt)}.`;
  });
}
