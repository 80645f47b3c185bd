import { Component, Directive, inject, input } from '@angular/core';

let fieldCount = 0;

/** A labelled control: label above, hint below, and the complaint in words beside it. Holds one `tbInput`. */
@Component({
  selector: 'tb-field',
  templateUrl: './field.html',
  styleUrl: './field.scss',
})
export class Field {
  readonly label = input.required<string>();
  readonly hint = input<string>();
  readonly error = input<string>();
  /** Stands inside the control's end; the label or hint should name it too, since it is not read aloud. */
  readonly unit = input<string>();

  readonly id = `tb-field-${++fieldCount}`;

  /** Ids of the texts that describe the control, for aria-describedby. */
  describedBy(): string | null {
    const ids = [this.hint() ? `${this.id}-hint` : '', this.error() ? `${this.id}-error` : ''].filter(Boolean);
    return ids.length > 0 ? ids.join(' ') : null;
  }
}

/** The native control inside a `tb-field`. */
@Directive({
  selector: 'input[tbInput], select[tbInput], textarea[tbInput]',
  host: {
    class: 'tb-input',
    '[id]': 'field.id',
    '[attr.aria-describedby]': 'field.describedBy()',
    '[attr.aria-invalid]': 'field.error() ? true : null',
    '[class.has-unit]': 'field.unit() !== undefined',
  },
})
export class FieldInput {
  protected readonly field = inject(Field);
}
