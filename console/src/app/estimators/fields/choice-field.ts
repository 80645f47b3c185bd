import { Component, input, model } from '@angular/core';
import type { Choice } from '../words/method-words';

let choiceFieldCount = 0;

/** Radio buttons, each with its one-line explanation. */
@Component({
  selector: 'tb-choice-field',
  template: `
    <fieldset class="tb-choices">
      <legend>{{ label() }}</legend>
      @for (choice of choices(); track choice.value) {
        <div>
          <label class="tb-choice">
            <input
              type="radio"
              [name]="id"
              [value]="choice.value"
              [checked]="choice.value === value()"
              [attr.aria-describedby]="id + choice.value"
              (change)="value.set(choice.value)"
            />
            <span>{{ choice.name }}</span>
          </label>
          <p class="tb-small" [id]="id + choice.value">{{ choice.explanation }}</p>
        </div>
      }
    </fieldset>
  `,
  styles: `
    .tb-choice:has(:checked) span {
      font-weight: 600;
    }

    p {
      margin: 0 0 0 calc(1.125rem + var(--tb-space-2));
    }
  `,
})
export class ChoiceField<Value extends string> {
  readonly label = input.required<string>();
  readonly choices = input.required<readonly Choice<Value>[]>();
  readonly value = model.required<Value>();

  protected readonly id = `tb-choice-field-${++choiceFieldCount}`;
}
