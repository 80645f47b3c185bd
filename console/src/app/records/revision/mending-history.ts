import { Component, computed, inject, input, signal } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RecordRevision } from '../../api/contract';
import { RecordsClient } from '../../api/records-client';
import { SessionStore } from '../../api/session-store';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { MomentPipe } from '../../ui/moment-pipes';
import { ProblemNotice } from '../../ui/problem-notice';

/** Mended revisions whose steps are offered before the rest is asked for. */
const OFFERED = 3;

/** How a mended revision was made, and the ways to mend this one: by its steps changed, by those of another, or anew. */
@Component({
  selector: 'tb-mending-history',
  imports: [LoadingState, MomentPipe, ProblemNotice, RouterLink],
  templateUrl: './mending-history.html',
  styleUrl: './mending-history.scss',
})
export class MendingHistory {
  private readonly records = inject(RecordsClient);

  readonly revision = input.required<RecordRevision>();

  protected readonly mayMend = inject(SessionStore).holds('analyst');
  /** Rows that were erased can be mended no more. */
  protected readonly mendable = computed(() => this.mayMend && this.revision().erasedAt === null);
  protected readonly mending = computed(() => this.revision().mending ?? undefined);
  private readonly setId = computed(() => (this.mendable() ? this.revision().recordSetId : undefined));
  protected readonly set = load(() => {
    const id = this.setId();
    return id === undefined ? undefined : this.records.read(id);
  });
  /** Mended revisions of the set that were made from another revision than this one, newest first. */
  protected readonly others = computed(() => {
    const { id } = this.revision();
    return (this.set.value()?.revisions ?? [])
      .filter((other) => other.origin === 'mended' && other.id !== id && other.basedOn?.id !== id)
      .sort((a, b) => b.number - a.number);
  });
  protected readonly all = signal(false);
  protected readonly offered = computed(() => (this.all() ? this.others() : this.others().slice(0, OFFERED)));
  protected readonly hidden = computed(() => this.others().length - this.offered().length);
}
