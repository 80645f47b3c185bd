import { Component, computed, input, linkedSignal } from '@angular/core';
import type { ColumnComparison, RevisionComparison } from '../../api/contract';
import { NO_FIGURE, formatCount } from '../../ui/figure';
import { listView } from '../../ui/list-view';
import { Pager } from '../../ui/pager';
import { PairedHistogram } from '../../ui/plots/paired-histogram';
import { TableBox } from '../../ui/table-box';
import { KIND_WORDS } from '../revision/column-words';
import { ComparedColumn } from './compared-column';
import { COLUMN_STATES, differingFirst } from './comparison-words';

interface LevelParts {
  readonly from: readonly number[];
  readonly to: readonly number[];
}

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
        levels: levelParts(column),
      };
    }),
  );

  protected toggle(name: string): void {
    this.openName.update((open) => (open === name ? undefined : name));
  }
}

/** The levels of both sides in the same order, as shares of the readings that are listed. */
function levelParts({ shape }: ColumnComparison): LevelParts | undefined {
  if (!shape || shape.levels.length === 0) return undefined;
  const shares = (counts: readonly number[]): readonly number[] => {
    const total = counts.reduce((sum, count) => sum + count, 0) || 1;
    return counts.map((count) => (100 * count) / total);
  };
  return { from: shares(shape.from), to: shares(shape.to) };
}

function unitsOf(from: string | null | undefined, to: string | null | undefined): string {
  const units = [from, to].filter((unit) => unit !== undefined).map((unit) => unit ?? NO_FIGURE);
  return [...new Set(units)].join(' → ');
}
