import { Component, input, model } from '@angular/core';
import type { Choice } from '../words/method-words';
import { nextFieldId } from './field-id';

/** Radio buttons, each with its one-line explanation. */
@Component({
  selector: 'tb-choice-field',
  template: `
    <fieldset>
      <legend class="label">{{ label() }}</legend>
      @for (choice of choices(); track choice.value) {
        <label class="choice">
          <input
            type="radio"
            [name]="id"
            [value]="choice.value"
            [checked]="choice.value === value()"
            [attr.aria-describedby]="id + choice.value"
            (change)="value.set(choice.value)"
          />
          <span class="name">{{ choice.name }}</span>
        </label>
        <p class="explanation" [id]="id + choice.value">{{ choice.explanation }}</p>
      }
    </fieldset>
  `,
  styleUrls: ['./field.scss', './choice-field.scss'],
})
export class ChoiceField<Value extends string> {
  readonly label = input.required<string>();
  readonly choices = input.required<readonly Choice<Value>[]>();
  readonly value = model.required<Value>();

  protected readonly id = nextFieldId();
}
