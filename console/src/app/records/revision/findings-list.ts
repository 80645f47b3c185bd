import { Component, inject, input } from '@angular/core';
import { RecordsClient } from '../../api/records-client';
import { CountPipe } from '../../ui/figure-pipes';
import { listView } from '../../ui/list-view';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { Pager } from '../../ui/pager';
import { ProblemNotice } from '../../ui/problem-notice';
import { FindingEntry } from './finding-entry';

/** What a person should look at in these records before a model hides it. */
@Component({
  selector: 'tb-findings-list',
  imports: [CountPipe, FindingEntry, LoadingState, Pager, ProblemNotice],
  templateUrl: './findings-list.html',
  styleUrl: './findings-list.scss',
})
export class FindingsList {
  private readonly client = inject(RecordsClient);

  readonly revisionId = input.required<string>();

  protected readonly findings = load(() => this.client.readFindings(this.revisionId()));
  /** In the service's own order. */
  protected readonly view = listView(() => this.findings.value()?.items ?? [], {
    sortKeys: {},
    firstSort: { active: '', direction: '' },
  });
}
