import { Component, computed, input, output } from '@angular/core';
import type { ColumnKind } from '../../api/contract';
import { Field, FieldInput } from '../../ui/field';
import { KIND_WORDS } from '../revision/column-words';
import type { TrialColumn } from './trials';

/** Chooses a column as it stands before the step. */
@Component({
  selector: 'tb-column-choice-field',
  imports: [Field, FieldInput],
  template: `
    <tb-field label="Column" [hint]="hint()" [error]="error()">
      <select tbInput #control (change)="chosen.emit(control.value)">
        <option value="" [selected]="value() === ''">Choose a column</option>
        @if (gone(); as name) {
          <option [value]="name" selected>{{ name }} (not there at this point)</option>
        }
        @for (column of fitting(); track column.name) {
          <option [value]="column.name" [selected]="column.name === value()">{{ column.name }}</option>
        }
      </select>
    </tb-field>
  `,
})
export class ColumnChoiceField {
  readonly columns = input.required<readonly TrialColumn[]>();
  readonly value = input.required<string>();
  readonly error = input<string>();
  /** The kind that the step takes; any without. */
  readonly of = input<ColumnKind>();
  readonly chosen = output<string>();

  protected readonly fitting = computed(() => {
    const kind = this.of();
    return kind ? this.columns().filter((column) => column.kind === kind) : this.columns();
  });
  protected readonly gone = computed(() => {
    const value = this.value();
    return value !== '' && !this.fitting().some(({ name }) => name === value) ? value : undefined;
  });
  protected readonly hint = computed(() => {
    const column = this.columns().find(({ name }) => name === this.value());
    if (!column) return undefined;
    return column.unit ? `${KIND_WORDS[column.kind]}, ${column.unit}` : KIND_WORDS[column.kind];
  });
}
