import { Component, ElementRef, computed, input, model, viewChild } from '@angular/core';
import { nextFieldId } from './field-id';

@Component({
  selector: 'tb-text-field',
  templateUrl: './text-field.html',
  styleUrl: './field.scss',
})
export class TextField {
  readonly label = input.required<string>();
  readonly value = model('');
  readonly hint = input('');
  readonly error = input<string>();
  readonly unit = input('');
  readonly optional = input(false);
  /** A decimal keypad; numbers that may be negative ask for none, because some keypads have no minus. */
  readonly keypad = input<'text' | 'decimal' | 'numeric'>('text');
  /** More than one line makes a text area. */
  readonly lines = input(1);

  protected readonly id = nextFieldId();
  protected readonly describedBy = computed(() => {
    const parts = [this.error() ? `${this.id}-wrong` : '', this.hint() ? `${this.id}-hint` : ''].filter(Boolean);
    return parts.length > 0 ? parts.join(' ') : null;
  });
  private readonly control = viewChild.required<ElementRef<HTMLInputElement | HTMLTextAreaElement>>('control');

  focus(): void {
    this.control().nativeElement.focus();
  }
}
