import { Component, computed, input } from '@angular/core';
import type { FitResult } from '../../api/contract';
import { TableBox } from '../../ui/table-box';
import { penaltyEquivalents } from './penalty-equivalents';

/** The chosen penalty and what it is called elsewhere. */
@Component({
  selector: 'tb-penalty-table',
  imports: [TableBox],
  template: `
    <tb-table-box label="The penalty and its equivalents">
      <table class="tb-table">
        <caption class="tb-only-read">
          The penalty and its equivalents
        </caption>
        <tbody>
          @for (row of rows(); track row.name) {
            <tr>
              <th scope="row">{{ row.name }}</th>
              <td class="tb-figure">{{ row.figure }}</td>
              <td class="tb-muted">{{ row.explanation }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
  `,
})
export class PenaltyTable {
  readonly result = input.required<FitResult>();
  readonly scaleUnit = input.required<string>();

  protected readonly rows = computed(() => penaltyEquivalents(this.result(), this.scaleUnit()));
}
