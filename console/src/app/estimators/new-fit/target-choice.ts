import { Component, computed, input, output } from '@angular/core';
import type { RecordRevision } from '../../api/contract';
import { SelectField, type Option } from '../fields/select-field';
import { numericColumns, type FitDraft } from './fit-draft';
import type { DraftProblems } from './read-draft';

const SCALES: readonly Option[] = [
  { value: 'none', name: 'as it stands' },
  { value: 'log', name: 'on the log scale' },
];

/** What is to be estimated. */
@Component({
  selector: 'tb-target-choice',
  imports: [SelectField],
  template: `
    <tb-select-field
      label="Target"
      empty="Choose what to estimate"
      hint="The column that says what each past case came to."
      [options]="columns()"
      [value]="draft().target"
      [error]="problems().get('specification/target/column')"
      (valueChange)="changed.emit({ target: $event })"
    />
    <tb-select-field
      label="Scale"
      hint="On the log scale inputs act as factors. It suits amounts that spread as they grow; every target must be above 0."
      [options]="scales"
      [value]="draft().targetTransform"
      [error]="problems().get('specification/target/transform')"
      (valueChange)="changed.emit({ targetTransform: $event === 'log' ? 'log' : 'none' })"
    />
    <tb-select-field
      label="Weights of the records"
      empty="every record counts alike"
      hint="A column that says how much each record counts."
      [options]="weights()"
      [value]="draft().weightColumn"
      [error]="problems().get('specification/weightColumn')"
      (valueChange)="changed.emit({ weightColumn: $event })"
    />
  `,
  styleUrl: './choices.scss',
})
export class TargetChoice {
  readonly revision = input.required<RecordRevision>();
  readonly draft = input.required<FitDraft>();
  readonly problems = input.required<DraftProblems>();
  readonly changed = output<Partial<FitDraft>>();

  protected readonly scales = SCALES;
  protected readonly columns = computed<readonly Option[]>(() =>
    numericColumns(this.revision()).map(({ name, unit }) => ({ value: name, name: unit ? `${name}, ${unit}` : name })),
  );
  protected readonly weights = computed(() => this.columns().filter((column) => column.value !== this.draft().target));
}
