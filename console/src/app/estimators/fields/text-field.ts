import { Component, input, model } from '@angular/core';
import { Field, FieldInput } from '../../ui/field';

/** A labelled line or paragraph of text, as a two-way value. */
@Component({
  selector: 'tb-text-field',
  imports: [Field, FieldInput],
  template: `
    <tb-field
      [label]="optional() ? label() + ' (optional)' : label()"
      [hint]="hint()"
      [error]="error()"
      [unit]="unit()"
    >
      @if (lines() > 1) {
        <textarea tbInput #text [rows]="lines()" [value]="value()" (input)="value.set(text.value)"></textarea>
      } @else {
        <input
          tbInput
          #text
          type="text"
          autocomplete="off"
          [attr.inputmode]="keypad()"
          [attr.spellcheck]="keypad() === 'text' ? null : false"
          [value]="value()"
          (input)="value.set(text.value)"
        />
      }
    </tb-field>
  `,
})
export class TextField {
  readonly label = input.required<string>();
  readonly value = model('');
  readonly hint = input<string>();
  readonly error = input<string>();
  /** Say it in the hint as well: the end of a field is not read aloud. */
  readonly unit = input<string>();
  readonly optional = input(false);
  /** Numbers that may be negative ask for no keypad, because some have no minus. */
  readonly keypad = input<'text' | 'decimal' | 'numeric'>('text');
  /** More than one line makes a text area. */
  readonly lines = input(1);
}
