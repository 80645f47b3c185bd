import { Component, input, model } from '@angular/core';
import { Field, FieldInput } from '../../ui/field';

export interface Option {
  readonly value: string;
  readonly name: string;
}

/** A labelled choice of one from a list, as a two-way value. */
@Component({
  selector: 'tb-select-field',
  imports: [Field, FieldInput],
  template: `
    <tb-field [label]="label()" [hint]="hint()" [error]="error()">
      <select tbInput #control [disabled]="disabled()" (change)="value.set(control.value)">
        @if (empty(); as words) {
          <option value="" [selected]="value() === ''">{{ words }}</option>
        }
        @for (option of options(); track option.value) {
          <option [value]="option.value" [selected]="option.value === value()">{{ option.name }}</option>
        }
      </select>
    </tb-field>
  `,
})
export class SelectField {
  readonly label = input.required<string>();
  readonly options = input.required<readonly Option[]>();
  readonly value = model('');
  /** Words of the empty choice; without them there is none. */
  readonly empty = input<string>();
  readonly hint = input<string>();
  readonly error = input<string>();
  readonly disabled = input(false);
}
