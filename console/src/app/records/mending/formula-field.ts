import { Component, ElementRef, afterRenderEffect, computed, input, model, untracked, viewChild } from '@angular/core';
import { Field, FieldInput } from '../../ui/field';
import { columnInFormula, formulaComplaint } from './formula-complaint';

/** A condition on rows, or a number for each row, with its language explained on demand. */
@Component({
  selector: 'tb-formula-field',
  imports: [Field, FieldInput],
  templateUrl: './formula-field.html',
  styleUrl: './formula-field.scss',
})
export class FormulaField {
  readonly label = input.required<string>();
  /** What the formula gives. */
  readonly gives = input.required<'condition' | 'number'>();
  /** Names of the columns that it may use. */
  readonly columns = input.required<readonly string[]>();
  /** A complaint of the form; or of the service, which then names a character. */
  readonly error = input<string>();
  readonly value = model('');

  private readonly control = viewChild.required<ElementRef<HTMLTextAreaElement>>('control');
  /** About the formula as it was when the complaint came: that stays in the notice while the field is mended. */
  protected readonly complaint = computed(() => {
    const error = this.error();
    return error === undefined ? undefined : formulaComplaint(error, untracked(this.value));
  });

  constructor() {
    afterRenderEffect(() => {
      const character = this.complaint()?.place?.character;
      if (character !== undefined) this.control().nativeElement.setSelectionRange(character - 1, character);
    });
  }

  /** Puts a column where the cursor stands. */
  protected putIn(chooser: HTMLSelectElement): void {
    const { nativeElement } = this.control();
    const name = columnInFormula(chooser.value);
    chooser.value = '';
    nativeElement.setRangeText(name, nativeElement.selectionStart, nativeElement.selectionEnd, 'end');
    this.value.set(nativeElement.value);
    nativeElement.focus();
  }
}
