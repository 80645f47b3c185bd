import { Component, input, output } from '@angular/core';
import { SelectField, type Option } from '../fields/select-field';
import { TextField } from '../fields/text-field';
import type { InputDraft } from './fit-draft';

const SIGNS: readonly Option[] = [
  { value: 'any', name: 'any' },
  { value: 'not-negative', name: 'zero or above' },
  { value: 'not-positive', name: 'zero or below' },
];

/** What is seldom said of an input: how the form calls it, and limits on its weight. */
@Component({
  selector: 'tb-input-more',
  imports: [SelectField, TextField],
  template: `
    <tb-text-field
      label="Label on the form"
      [optional]="true"
      [value]="input().label"
      (valueChange)="changed.emit({ label: $event })"
    />
    <tb-text-field
      label="Help on the form"
      [optional]="true"
      [value]="input().help"
      (valueChange)="changed.emit({ help: $event })"
    />
    @if (!category()) {
      <tb-select-field
        label="Sign of its weight"
        [options]="signs"
        [value]="input().sign"
        (valueChange)="changed.emit({ sign: signOf($event) })"
      />
    }
    <tb-text-field
      label="Penalty factor"
      keypad="decimal"
      hint="1 is usual; 0 leaves the weight free."
      [value]="input().penaltyFactor"
      (valueChange)="changed.emit({ penaltyFactor: $event })"
    />
  `,
  styleUrl: './choices.scss',
})
export class InputMore {
  readonly input = input.required<InputDraft>();
  readonly category = input.required<boolean>();
  readonly changed = output<Partial<InputDraft>>();

  protected readonly signs = SIGNS;

  protected signOf(value: string): InputDraft['sign'] {
    return value === 'not-negative' || value === 'not-positive' ? value : 'any';
  }
}
