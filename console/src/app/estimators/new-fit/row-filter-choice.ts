import { Component, computed, input, output } from '@angular/core';
import type { RecordRevision } from '../../api/contract';
import { ChoiceGroup } from '../../ui/choice-group';
import { Field, FieldInput } from '../../ui/field';
import { CountPipe } from '../../ui/figure-pipes';
import { SelectField, type Option } from '../fields/select-field';
import { TextField } from '../fields/text-field';
import type { FitDraft } from './fit-draft';
import type { DraftProblems } from './read-draft';

/** Which records to use, where not all of them. */
@Component({
  selector: 'tb-row-filter-choice',
  imports: [ChoiceGroup, CountPipe, Field, FieldInput, SelectField, TextField],
  templateUrl: './row-filter-choice.html',
  styleUrl: './choices.scss',
})
export class RowFilterChoice {
  readonly revision = input.required<RecordRevision>();
  readonly draft = input.required<FitDraft>();
  readonly problems = input.required<DraftProblems>();
  readonly changed = output<Partial<FitDraft>>();

  protected readonly columns = computed<readonly Option[]>(() =>
    this.revision()
      .columns.filter((column) => column.kind !== 'text')
      .map(({ name }) => ({ value: name, name: `some, by ${name}` })),
  );
  protected readonly column = computed(() =>
    this.revision().columns.find((column) => column.name === this.draft().filterColumn),
  );

  /** Another column has other readings, so what was asked of the one before goes. */
  protected choose(filterColumn: string): void {
    this.changed.emit({ filterColumn, filterLevels: [], filterFrom: '', filterTo: '' });
  }

  protected toggle(level: string): void {
    const levels = this.draft().filterLevels;
    const filterLevels = levels.includes(level) ? levels.filter((other) => other !== level) : [...levels, level];
    this.changed.emit({ filterLevels });
  }
}
