import { Component, ElementRef, computed, input, model, viewChild } from '@angular/core';
import { nextFieldId } from './field-id';

export interface Option {
  readonly value: string;
  readonly name: string;
}

@Component({
  selector: 'tb-select-field',
  templateUrl: './select-field.html',
  styleUrl: './field.scss',
})
export class SelectField {
  readonly label = input.required<string>();
  readonly options = input.required<readonly Option[]>();
  readonly value = model('');
  /** Words of the empty choice; without them there is none. */
  readonly empty = input<string>();
  readonly hint = input('');
  readonly error = input<string>();
  readonly optional = input(false);
  readonly disabled = input(false);

  protected readonly id = nextFieldId();
  protected readonly describedBy = computed(() => {
    const parts = [this.error() ? `${this.id}-wrong` : '', this.hint() ? `${this.id}-hint` : ''].filter(Boolean);
    return parts.length > 0 ? parts.join(' ') : null;
  });
  private readonly control = viewChild.required<ElementRef<HTMLSelectElement>>('control');

  focus(): void {
    this.control().nativeElement.focus();
  }
}
