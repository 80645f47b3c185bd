import { Component, computed, input } from '@angular/core';
import type { FitResult } from '../../api/contract';
import { formatFigure } from '../../ui/figure';
import { TableBox } from '../../ui/table-box';
import { degreesAt } from '../figures/cross-validation-plot';
import { ruleName } from '../words/method-words';
import type { Diagnostics } from './diagnostics';

/** The penalties that the other rules would have chosen from the same records. */
@Component({
  selector: 'tb-rule-choices',
  imports: [TableBox],
  template: `
    <h3>What each rule would choose</h3>
    <tb-table-box label="What each rule would choose">
      <table class="tb-table">
        <caption class="tb-only-read">
          What each rule would choose
        </caption>
        <thead>
          <tr>
            <th scope="col">Rule</th>
            <th scope="col" class="tb-figure">λ</th>
            <th scope="col" class="tb-figure">Effective df</th>
            <th scope="col"></th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.name) {
            <tr>
              <th scope="row">{{ row.name }}</th>
              <td class="tb-figure">{{ row.lambda }}</td>
              <td class="tb-figure">{{ row.degrees }}</td>
              <td>{{ row.chosen ? 'chosen' : '' }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
  `,
  styles: `
    :host {
      display: block;
      max-width: 36rem;
      margin-top: var(--tb-space-5);
    }

    h3 {
      margin-bottom: var(--tb-space-2);
      font: var(--tb-type-body-strong);
    }
  `,
})
export class RuleChoices {
  readonly result = input.required<FitResult>();
  readonly choices = input.required<Diagnostics['choices']>();
  /** The rule that the specification asked for. */
  readonly asked = input.required<string>();

  protected readonly rows = computed(() =>
    this.choices().map(({ rule, lambda }) => ({
      name: ruleName(rule),
      lambda: formatFigure(lambda, { significant: 3 }),
      degrees: formatFigure(degreesAt(this.result(), lambda), { significant: 3 }),
      chosen: rule === this.asked(),
    })),
  );
}
