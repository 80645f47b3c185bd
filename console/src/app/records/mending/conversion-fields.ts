import { Component, computed, input, output } from '@angular/core';
import type { Complaints } from '../../ui/entry-form';
import { Field, FieldInput } from '../../ui/field';
import type { StepField } from './read-step';
import { factorInFull, type StepDraft } from './step-draft';
import { UNIT_CONVERSIONS, factorText } from './unit-conversions';

/** A conversion by its name, or any factor; and the unit that the column has afterwards. */
@Component({
  selector: 'tb-conversion-fields',
  imports: [Field, FieldInput],
  template: `
    <tb-field label="Conversion">
      <select tbInput #conversion (change)="choose(conversion.value)">
        <option value="" [selected]="chosen() === ''">Another factor</option>
        @for (choice of conversions; track choice.name) {
          <option [value]="choice.name" [selected]="choice.name === chosen()">
            {{ choice.name }} (× {{ choice.words }})
          </option>
        }
      </select>
    </tb-field>
    <tb-field label="Factor" hint="Readings are multiplied by it." [error]="complaints().factor">
      <input
        tbInput
        #factor
        type="text"
        autocomplete="off"
        spellcheck="false"
        [value]="draft().factor"
        (input)="changed.emit({ factor: factor.value })"
      />
    </tb-field>
    <tb-field label="Unit of the column afterwards" hint="Empty for none." [error]="complaints().unit">
      <input
        tbInput
        #unit
        type="text"
        autocomplete="off"
        [value]="draft().unit"
        (input)="changed.emit({ unit: unit.value })"
      />
    </tb-field>
  `,
  styles: `
    :host {
      display: grid;
      gap: var(--tb-space-4);
    }
  `,
})
export class ConversionFields {
  readonly draft = input.required<StepDraft>();
  readonly complaints = input.required<Complaints<StepField>>();
  readonly changed = output<Partial<StepDraft>>();

  protected readonly conversions = UNIT_CONVERSIONS.map((conversion) => ({
    ...conversion,
    words: factorText(conversion.factor),
  }));
  /** Two conversions may share a factor: the unit afterwards tells them apart. */
  protected readonly chosen = computed(() => {
    const { factor, unit } = this.draft();
    const alike = UNIT_CONVERSIONS.filter((conversion) => String(conversion.factor) === factor.trim());
    const named = alike.find((conversion) => conversion.unit === unit.trim());
    return (named ?? alike.find((conversion) => conversion.unit === undefined))?.name ?? '';
  });

  protected choose(name: string): void {
    const conversion = UNIT_CONVERSIONS.find((candidate) => candidate.name === name);
    if (!conversion) return this.changed.emit({ factor: '' });
    const factor = factorInFull(conversion.factor);
    this.changed.emit(conversion.unit === undefined ? { factor } : { factor, unit: conversion.unit });
  }
}
