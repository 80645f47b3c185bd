import { Component, input } from '@angular/core';

let groupCount = 0;

/** Checkboxes or radio buttons that answer one question, with the complaint in words under them. */
@Component({
  selector: 'tb-choice-group',
  template: `
    <fieldset class="tb-choices" [class.tb-complained]="error()" [attr.aria-describedby]="error() ? id : null">
      <legend>{{ legend() }}</legend>
      <ng-content />
      @if (error(); as error) {
        <p class="error" [id]="id">{{ error }}</p>
      }
    </fieldset>
  `,
  styles: `
    :host {
      display: block;
    }

    .error {
      margin: 0;
      color: var(--tb-madder);
      font: var(--tb-type-small-strong);
    }
  `,
})
export class ChoiceGroup {
  readonly legend = input.required<string>();
  readonly error = input<string>();
  protected readonly id = `tb-choice-group-${++groupCount}-error`;
}
