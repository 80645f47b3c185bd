import { Component, computed, effect, inject, input, linkedSignal, untracked } from '@angular/core';
import { ActivatedRoute, Router } from '@angular/router';
import { MendingClient } from '../../api/mending-client';
import { RecordsClient } from '../../api/records-client';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { FromQuestion } from './from-question';
import { MendingBoard } from './mending-board';
import { beginningOf, openingOf, takenOver, type Beginning } from './mending-opening';

/** Where a revision's records are mended: opens with the draft of an earlier day, or with the steps of another revision. */
@Component({
  selector: 'tb-mending-page',
  imports: [FromQuestion, LoadingState, MendingBoard, PageHead, ProblemNotice],
  template: `
    @if (opening.state() !== 'ready') {
      <tb-page-head heading="Mending" [parent]="{ label: 'Records', link: '/records' }" />
    }
    @switch (opening.state()) {
      @case ('loading') {
        <tb-loading-state label="Reading the revision and your steps" />
      }
      @case ('error') {
        <tb-problem-notice [problem]="opening.problem()!" (retry)="opening.reload()" />
      }
      @case ('ready') {
        @let begin = beginning()!;
        @if (begin.with === 'question') {
          <tb-page-head heading="Which steps?" [parent]="parent()" />
          <tb-from-question [question]="begin" (draftKept)="keepDraft()" (otherTaken)="takeOther()" />
        } @else {
          @for (each of [opening.value()!]; track each) {
            <tb-mending-board [opening]="each" [beginning]="begin" />
          }
        }
      }
    }
  `,
})
export class MendingPage {
  private readonly clients = { records: inject(RecordsClient), mending: inject(MendingClient) };
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);

  readonly id = input.required<string>();
  /** The mended revision whose steps are to be taken over; from the address. */
  readonly from = input<string>();

  /** Once read, it stays when it leaves the address: nothing is read again for that. */
  private readonly wanted = linkedSignal<Wanted, Wanted>({
    source: () => ({ id: this.id(), from: this.from() }),
    computation: (now, before) => (before && before.value.id === now.id && now.from === undefined ? before.value : now),
  });
  protected readonly opening = load(() => openingOf(this.clients, this.wanted().id, this.wanted().from));
  protected readonly beginning = linkedSignal<Beginning | undefined>(() => {
    const opening = this.opening.value();
    return opening && beginningOf(opening);
  });
  protected readonly parent = computed(() => {
    const revision = this.opening.value()?.revision;
    return (
      revision && {
        label: `${revision.recordSetName}, revision ${revision.number}`,
        link: `/records/revisions/${revision.id}`,
      }
    );
  });

  constructor() {
    // It was answered: reading the page again must neither ask nor take over again.
    effect(() => {
      const begin = this.beginning();
      if (begin && begin.with !== 'question' && this.from() !== undefined) untracked(() => this.forgetFrom());
    });
  }

  protected keepDraft(): void {
    this.beginning.set({ with: 'draft', steps: this.opening.value()?.draft.steps ?? [] });
  }

  protected takeOther(): void {
    const begin = this.beginning();
    if (begin?.with === 'question') this.beginning.set(takenOver(begin.other));
  }

  private forgetFrom(): void {
    void this.router.navigate([], { relativeTo: this.route, queryParams: {}, replaceUrl: true });
  }
}

interface Wanted {
  readonly id: string;
  readonly from: string | undefined;
}
