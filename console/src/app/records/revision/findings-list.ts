import { Component, computed, inject, input } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { map } from 'rxjs';
import type { RecordColumn } from '../../api/contract';
import { RecordsClient } from '../../api/records-client';
import { SessionStore } from '../../api/session-store';
import { Confirm } from '../../ui/confirm';
import { Field, FieldInput } from '../../ui/field';
import { countOf } from '../../ui/figure';
import { CountPipe } from '../../ui/figure-pipes';
import { listView } from '../../ui/list-view';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { Pager } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { wordsOfStep } from '../mending/step-words';
import { WaitingSteps } from '../mending/waiting-steps';
import { FindingEntry } from './finding-entry';

/** What a person should look at in these records before a model hides it, with remedies to add to the mending. */
@Component({
  selector: 'tb-findings-list',
  imports: [CountPipe, Field, FieldInput, FindingEntry, LoadingState, Pager, ProblemNotice, RouterLink],
  templateUrl: './findings-list.html',
  styleUrl: './findings-list.scss',
})
export class FindingsList {
  private readonly client = inject(RecordsClient);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly confirm = inject(Confirm);
  private readonly mayMend = inject(SessionStore).holds('analyst');

  readonly revisionId = input.required<string>();
  readonly columns = input<readonly RecordColumn[]>([]);

  private readonly wanted = toSignal(this.route.queryParamMap.pipe(map((params) => params.get('target') ?? '')), {
    initialValue: '',
  });
  protected readonly numeric = computed(() => this.columns().filter(({ kind }) => kind === 'numeric'));
  /** An address may name a column that this revision does not have. */
  protected readonly target = computed(() =>
    this.numeric().some(({ name }) => name === this.wanted()) ? this.wanted() : '',
  );
  protected readonly findings = load(() => this.client.readFindings(this.revisionId(), this.target() || undefined));
  protected readonly waiting = new WaitingSteps(() => (this.mayMend ? this.revisionId() : undefined));
  /** In the service's own order. */
  protected readonly view = listView(() => this.findings.value()?.items ?? [], {
    sortKeys: {},
    firstSort: { active: '', direction: '' },
  });
  /** Findings whose remedy could be added. */
  protected readonly open = computed(() =>
    this.waiting.steps === undefined
      ? []
      : (this.findings.value()?.items ?? []).filter(
          (finding) => finding.steps.length > 0 && !this.waiting.holds(finding),
        ),
  );

  protected choose(target: string): void {
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams: { target: target || null },
      queryParamsHandling: 'merge',
      replaceUrl: true,
    });
  }

  protected addEvery(): void {
    const findings = this.open();
    // Two findings may propose the same, which is then done once.
    const consequences = [...new Set(findings.flatMap(({ steps }) => steps).map((step) => `${wordsOfStep(step)}.`))];
    const heading = `Add ${countOf(consequences.length, 'step')} to the mending?`;
    this.confirm.ask({ heading, consequences, verb: 'Add them' }).subscribe((yes) => {
      if (yes) this.waiting.add(findings);
    });
  }
}
