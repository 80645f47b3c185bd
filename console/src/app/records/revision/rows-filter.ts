import { Component, computed, inject, input, linkedSignal } from '@angular/core';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import type { RecordColumn } from '../../api/contract';
import { Problem, errorOf } from '../../api/problem';
import { countOf } from '../../ui/figure';
import { Field, FieldInput } from '../../ui/field';
import { listed } from '../../ui/listed';
import { columnInFormula, formulaComplaint } from '../mending/formula-complaint';
import { conditionWords, levelIn } from './rows-condition';

/** Which rows are shown, in words, and a field for a condition of one's own. Both live in the page's address. */
@Component({
  selector: 'tb-rows-filter',
  imports: [Field, FieldInput, RouterLink],
  templateUrl: './rows-filter.html',
  styleUrl: './rows-filter.scss',
})
export class RowsFilter {
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);

  readonly columns = input.required<readonly RecordColumn[]>();
  readonly where = input<string>();
  readonly numbers = input<string>();
  /** How many rows there are of them; undefined while that is not known. */
  readonly total = input<number>();
  readonly problem = input<Problem>();

  protected readonly draft = linkedSignal(() => this.where() ?? '');
  protected readonly shown = computed(() => {
    const words = shownWords(this.where(), this.numbers());
    const total = this.total();
    return words === undefined || total === undefined ? words : `${words}: ${countOf(total, 'row')}`;
  });
  protected readonly hint = computed(() => `A condition such as ${exampleFor(this.columns())}`);
  protected readonly complaint = computed(() => {
    const reason = conditionComplaint(this.problem());
    return reason === undefined ? undefined : formulaComplaint(reason, this.where() ?? '');
  });

  protected apply(condition: string): void {
    const where = condition.trim();
    void this.router.navigate([], {
      relativeTo: this.route,
      queryParams: where === '' ? {} : { where },
      fragment: 'rows',
    });
  }
}

/** What the service found wrong with the condition itself, and not with the call. */
export function conditionComplaint(problem: Problem | undefined): string | undefined {
  return errorOf(problem, 'where') ?? errorOf(problem, 'numbers');
}

function shownWords(where: string | undefined, numbers: string | undefined): string | undefined {
  const condition = where ? conditionWords(where) : undefined;
  if (!numbers) return condition && `Only rows where ${condition}`;
  const rows = numbers.split(',');
  const named = `${rows.length === 1 ? 'row' : 'rows'} ${listed(rows)}`;
  return condition ? `Only ${named}, where ${condition}` : `Only ${named}`;
}

function exampleFor(columns: readonly RecordColumn[]): string {
  const figure = columns.find(({ kind, mean }) => kind === 'numeric' && mean !== null);
  const category = columns.find(({ kind, levels }) => kind === 'category' && levels.length > 0);
  const parts = [
    figure && `${columnInFormula(figure.name)} > ${Math.round(figure.mean ?? 0)}`,
    category && levelIn(category, category.levels[0].value),
  ].filter((part) => part !== undefined);
  return parts.length > 0 ? parts.join(' and ') : `${columnInFormula(columns[0]?.name ?? 'column')} is missing`;
}
