import { ChangeDetectionStrategy, Component, computed, input, output, signal, ViewEncapsulation } from '@angular/core';
import { outsideNotice, rangeHint, unitForReaders } from './field-words';
import { FormField } from './form-field';
import { readField } from './read-case';

/** One field with its label, its hints, its error and its notice. Controls are the browser's own. */
@Component({
  selector: 'tb-form-entry',
  templateUrl: './form-entry.html',
  encapsulation: ViewEncapsulation.None,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FormEntry {
  readonly field = input.required<FormField>();
  readonly typed = input.required<string>();
  /** Of the control; for radio buttons, of the first. */
  readonly controlId = input.required<string>();
  readonly error = input<string>();
  readonly locale = input<string>();
  readonly typedChange = output<string>();

  protected readonly range = computed(() => rangeHint(this.field(), this.locale()));
  protected readonly unitForReaders = computed(() => unitForReaders(this.field()));
  protected readonly optional = computed(() => this.field().blank !== 'refused');
  /** Looked at when the field is left, so that no half-typed number is remarked upon. */
  protected readonly notice = computed(() => {
    const reading = readField(this.field(), this.settled() ?? this.typed(), this.locale());
    return reading.ok ? outsideNotice(this.field(), reading.value, this.locale()) : null;
  });
  protected readonly describedBy = computed(() => {
    const parts = [
      this.error() && 'error',
      this.field().help && 'help',
      this.range() && 'range',
      this.notice() && 'notice',
    ];
    return parts.flatMap((part) => (part ? [`${this.controlId()}-${part}`] : [])).join(' ') || null;
  });
  private readonly settled = signal<string | null>(null);

  protected onInput(event: Event): void {
    this.settled.set(this.settled() ?? this.typed());
    this.typedChange.emit(valueOf(event));
  }

  protected onChange(event: Event): void {
    this.settled.set(null);
    this.typedChange.emit(valueOf(event));
  }
}

function valueOf({ target }: Event): string {
  return target instanceof HTMLInputElement || target instanceof HTMLSelectElement ? target.value : '';
}
