import { Component, computed, input } from '@angular/core';
import type { Edition, SpecificationInput } from '../../api/contract';
import { formatFigure } from '../../ui/figure';
import { TableBox } from '../../ui/table-box';
import { formulaRows, formulaWords } from './formula-rows';

/** The formula itself, so that anyone can follow it by hand. */
@Component({
  selector: 'tb-edition-formula',
  imports: [TableBox],
  template: `
    <p>{{ words() }}</p>
    <tb-table-box label="Formula">
      <table class="tb-table">
        <caption class="tb-only-read">
          Terms of the formula
        </caption>
        <thead>
          <tr>
            <th scope="col" class="tb-figure">Weight</th>
            <th scope="col">times</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track $index) {
            <tr>
              <td class="tb-figure weight">{{ row.text }}</td>
              <td>{{ row.times }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
    <dl class="tb-facts">
      <dt>Checksum of the frozen formula</dt>
      <dd>
        <code>{{ edition().checksum }}</code>
      </dd>
    </dl>
    <p class="tb-small">Six digits that count are shown; the frozen formula behind the checksum has them all.</p>
  `,
  styles: `
    .weight {
      width: 9rem;
    }

    .tb-facts {
      margin: var(--tb-space-4) 0 var(--tb-space-2);
    }
  `,
})
export class EditionFormula {
  readonly edition = input.required<Edition>();
  /** What the fit's specification said of each input; transforms are named from it. */
  readonly inputs = input<readonly SpecificationInput[]>([]);

  protected readonly words = computed(() => formulaWords(this.edition()));
  protected readonly rows = computed(() =>
    formulaRows(this.edition(), this.inputs()).map((row) => ({
      ...row,
      text: formatFigure(row.weight, { significant: 6, signed: true }),
    })),
  );
}
