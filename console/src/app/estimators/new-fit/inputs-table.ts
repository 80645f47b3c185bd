import { Component, computed, input, linkedSignal, output, signal } from '@angular/core';
import type { RecordColumn, RecordRevision } from '../../api/contract';
import { CountPipe } from '../../ui/figure-pipes';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { TableBox } from '../../ui/table-box';
import { TextField } from '../fields/text-field';
import { isTaken, usedInputs, type FitDraft, type InputDraft, type InputsChange } from './fit-draft';
import { InputMore } from './input-more';
import type { DraftProblems } from './read-draft';

interface InputRow {
  readonly draft: InputDraft;
  readonly column: RecordColumn;
  readonly taken: boolean;
  readonly category: boolean;
  readonly problem: string | undefined;
}

/** One row a column: whether it is used and how it is read. */
@Component({
  selector: 'tb-inputs-table',
  imports: [CountPipe, InputMore, Pager, TableBox, TextField],
  templateUrl: './inputs-table.html',
  styleUrl: './inputs-table.scss',
})
export class InputsTable {
  readonly revision = input.required<RecordRevision>();
  readonly draft = input.required<FitDraft>();
  readonly problems = input.required<DraftProblems>();
  /** Only what changed is told, so that two changes before the next drawing both count. */
  readonly changed = output<InputsChange>();

  protected readonly filter = signal('');
  protected readonly offset = linkedSignal<unknown, number>({
    source: () => [this.filter(), this.revision().id],
    computation: () => 0,
  });
  protected readonly open = signal<ReadonlySet<string>>(new Set());
  protected readonly isLong = computed(() => this.draft().inputs.length > ROWS_A_PAGE);
  protected readonly usedCount = computed(() => usedInputs(this.draft()).length);
  protected readonly passing = computed(() => {
    const words = this.filter().trim().toLowerCase();
    return this.draft().inputs.filter((row) => row.column.toLowerCase().includes(words));
  });
  protected readonly rows = computed(() => {
    const columns = new Map(this.revision().columns.map((column) => [column.name, column]));
    return this.passing()
      .slice(this.offset(), this.offset() + ROWS_A_PAGE)
      .flatMap((draft): readonly InputRow[] => {
        const column = columns.get(draft.column);
        if (!column) return [];
        const category = (draft.kind === 'own' ? column.kind : draft.kind) === 'category';
        return [
          {
            draft,
            column,
            category,
            taken: isTaken(this.draft(), draft.column),
            problem: this.problems().get(`input:${draft.column}`),
          },
        ];
      });
  });

  protected change(column: string, change: Partial<InputDraft>): void {
    this.changed.emit({ columns: [column], change });
  }

  /** Ticks or clears what the filter shows. */
  protected useShown(used: boolean): void {
    this.changed.emit({ columns: this.passing().map((row) => row.column), change: { used } });
  }

  protected toggleMore(column: string): void {
    this.open.update((before) => {
      const after = new Set(before);
      if (!after.delete(column)) after.add(column);
      return after;
    });
  }

  protected transformOf(value: string): InputDraft['transform'] {
    return value === 'log' || value === 'square-root' || value === 'spline' ? value : 'none';
  }

  protected kindOf(value: string): InputDraft['kind'] {
    return value === 'numeric' || value === 'category' ? value : 'own';
  }
}
