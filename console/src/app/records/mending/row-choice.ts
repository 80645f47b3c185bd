import { Component, input, output } from '@angular/core';
import { ChoiceGroup } from '../../ui/choice-group';
import type { Complaints } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import { FormulaField } from './formula-field';
import type { StepField } from './read-step';
import type { StepDraft } from './step-draft';

/** Which rows a step is about: those where a condition holds, those given by number, or both at once. */
@Component({
  selector: 'tb-row-choice',
  imports: [ChoiceGroup, Field, FieldInput, FormulaField],
  template: `
    <tb-choice-group legend="Which rows" [error]="complaints().choice">
      <label class="tb-choice">
        <input
          #byCondition
          type="checkbox"
          [checked]="draft().byCondition"
          (change)="changed.emit({ byCondition: byCondition.checked })"
        />
        <span>Only where a condition holds</span>
      </label>
      @if (draft().byCondition) {
        <tb-formula-field
          label="Condition"
          gives="condition"
          [columns]="columns()"
          [error]="complaints().where"
          [value]="draft().where"
          (valueChange)="changed.emit({ where: $event })"
        />
      }
      <label class="tb-choice">
        <input
          #byNumber
          type="checkbox"
          [checked]="draft().byNumber"
          (change)="changed.emit({ byNumber: byNumber.checked })"
        />
        <span>Only rows given by number</span>
      </label>
      @if (draft().byNumber) {
        <tb-field
          label="Row numbers"
          hint="Parted by commas, counted from 1 as the rows stand before this step."
          [error]="complaints().rows"
        >
          <textarea
            tbInput
            #rows
            rows="2"
            [value]="draft().rows"
            (input)="changed.emit({ rows: rows.value })"
          ></textarea>
        </tb-field>
      }
      @if (every() && !draft().byCondition && !draft().byNumber) {
        <p class="tb-small">Every row.</p>
      }
    </tb-choice-group>
  `,
  styles: `
    tb-formula-field,
    tb-field {
      margin-left: calc(1.125rem + var(--tb-space-2));
    }

    p {
      margin: 0;
    }
  `,
})
export class RowChoice {
  readonly draft = input.required<StepDraft>();
  readonly columns = input.required<readonly string[]>();
  readonly complaints = input.required<Complaints<StepField>>();
  /** Whether the step may be about every row. */
  readonly every = input(false);
  readonly changed = output<Partial<StepDraft>>();
}
