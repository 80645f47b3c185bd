import { Component, computed, input, output } from '@angular/core';
import type { RecordSetDetail, RecordSetSummary } from '../../api/contract';
import { countOf } from '../../ui/figure';
import { formatDay } from '../../ui/moment';
import { SelectField, type Option } from '../fields/select-field';
import type { DraftProblems } from './read-draft';

/** Which record set, and which of its revisions. */
@Component({
  selector: 'tb-records-choice',
  imports: [SelectField],
  template: `
    <tb-select-field
      label="Record set"
      empty="Choose a record set"
      [options]="sets()"
      [value]="recordSetId()"
      [error]="recordSetId() ? undefined : problems().get('revisionId')"
      (valueChange)="setChosen.emit($event)"
    />
    <tb-select-field
      label="Revision"
      empty="Choose a revision"
      [options]="revisions()"
      [value]="revisionId()"
      [disabled]="!recordSet()"
      [error]="recordSetId() ? problems().get('revisionId') : undefined"
      (valueChange)="revisionChosen.emit($event)"
    />
  `,
  styleUrl: './choices.scss',
})
export class RecordsChoice {
  readonly recordSets = input.required<readonly RecordSetSummary[]>();
  readonly recordSet = input<RecordSetDetail>();
  readonly recordSetId = input.required<string>();
  readonly revisionId = input.required<string>();
  readonly problems = input.required<DraftProblems>();
  readonly setChosen = output<string>();
  readonly revisionChosen = output<string>();

  protected readonly sets = computed<readonly Option[]>(() =>
    this.recordSets().map(({ id, name }) => ({ value: id, name })),
  );
  protected readonly revisions = computed<readonly Option[]>(() =>
    (this.recordSet()?.revisions ?? []).map((revision) => ({
      value: revision.id,
      name: `${revision.number}, ${countOf(revision.rowCount, 'row')}, ${formatDay(revision.createdAt)}`,
    })),
  );
}
