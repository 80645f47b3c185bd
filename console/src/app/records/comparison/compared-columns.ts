import { Component, computed, input, linkedSignal } from '@angular/core';
import type { RevisionComparison } from '../../api/contract';
import { NO_FIGURE, formatCount } from '../../ui/figure';
import { listView } from '../../ui/list-view';
import { Pager } from '../../ui/pager';
import { PairedHistogram } from '../../ui/plots/paired-histogram';
import { TableBox } from '../../ui/table-box';
import { KIND_WORDS } from '../revision/column-words';
import { ComparedColumn } from './compared-column';
import { COLUMN_STATES, differingFirst } from './comparison-words';

/** Every column of the two, those that differ first; a name opens both distributions and their figures. */
@Component({
  selector: 'tb-compared-columns',
  imports: [ComparedColumn, Pager, PairedHistogram, TableBox],
  templateUrl: './compared-columns.html',
  styleUrl: './compared-columns.scss',
})
export class ComparedColumns {
  readonly comparison = input.required<RevisionComparison>();

  /** In the order given, which puts what differs first. */
  protected readonly view = listView(() => differingFirst(this.comparison().columns), {
    sortKeys: {},
    firstSort: { active: '', direction: '' },
  });
  protected readonly openName = linkedSignal<unknown, string | undefined>({
    source: () => this.comparison(),
    computation: () => undefined,
  });
  protected readonly fromName = computed(() => `revision ${this.comparison().from.number}`);
  protected readonly toName = computed(() => `revision ${this.comparison().to.number}`);
  protected readonly rows = computed(() =>
    this.view.rows().map((column) => {
      const kinds = [column.from?.kind, column.to?.kind].filter((kind) => kind !== undefined);
      return {
        column,
        state: COLUMN_STATES[column.state],
        kind: [...new Set(kinds.map((kind) => KIND_WORDS[kind]))].join(' → '),
        unit: unitsOf(column.from?.unit, column.to?.unit),
        changed: column.changedCount === null ? NO_FIGURE : formatCount(column.changedCount),
        dates: column.to?.kind === 'date',
      };
    }),
  );

  protected toggle(name: string): void {
    this.openName.update((open) => (open === name ? undefined : name));
  }
}

function unitsOf(from: string | null | undefined, to: string | null | undefined): string {
  const units = [from, to].filter((unit) => unit !== undefined).map((unit) => unit ?? NO_FIGURE);
  return [...new Set(units)].join(' → ');
}
