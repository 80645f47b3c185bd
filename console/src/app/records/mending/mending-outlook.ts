import { Component, computed, input } from '@angular/core';
import type { RecordRevision } from '../../api/contract';
import { NO_FIGURE, countOf, formatCount } from '../../ui/figure';
import { listView } from '../../ui/list-view';
import { Pager } from '../../ui/pager';
import { TableBox } from '../../ui/table-box';
import { KIND_WORDS } from '../revision/column-words';
import { columnMarks } from './column-marks';
import type { Steps } from './steps-history';
import type { Outlook } from './trials';

/** What would come out of the steps: how many rows, and the columns as they would be. */
@Component({
  selector: 'tb-mending-outlook',
  imports: [Pager, TableBox],
  templateUrl: './mending-outlook.html',
  styleUrl: './mending-outlook.scss',
})
export class MendingOutlook {
  readonly revision = input.required<RecordRevision>();
  /** The steps that were tried. */
  readonly steps = input.required<Steps>();
  readonly outlook = input.required<Outlook>();

  protected readonly view = listView(() => this.outlook().columns, {
    sortKeys: {},
    firstSort: { active: '', direction: '' },
  });
  protected readonly facts = computed(() => {
    const { rowCount, columns } = this.outlook();
    const before = this.revision();
    return [
      { name: 'Rows', before: formatCount(before.rowCount), after: formatCount(rowCount) },
      { name: 'Columns', before: formatCount(before.columns.length), after: formatCount(columns.length) },
    ];
  });
  protected readonly gone = computed(() => {
    const left = new Set(this.outlook().columns.map(({ name }) => name));
    return this.revision()
      .columns.map(({ name }) => name)
      .filter((name) => !left.has(name));
  });
  protected readonly upTo = computed(() => {
    const { refused } = this.outlook();
    if (!refused) return undefined;
    if (refused.index === 0) return 'The first step cannot be done, so this is the revision as it is.';
    return `After the first ${countOf(refused.index, 'step')}; step ${refused.index + 1} cannot be done.`;
  });
  private readonly marks = computed(() => columnMarks(this.steps(), this.outlook().effects));
  protected readonly rows = computed(() =>
    this.view.rows().map((column) => ({
      column,
      kind: KIND_WORDS[column.kind],
      unit: column.unit ?? NO_FIGURE,
      missing: column.missingCount === 0 ? 'none' : formatCount(column.missingCount),
      mark: this.marks().get(column.name),
    })),
  );
}
