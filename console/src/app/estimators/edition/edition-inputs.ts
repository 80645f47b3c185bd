import { Component, computed, input } from '@angular/core';
import { formatReading } from '@widget/format/number-format';
import type { Edition } from '../../api/contract';
import { formatDay } from '../../ui/moment';
import { TableBox } from '../../ui/table-box';
import { caseFields, type CaseField } from '../try/case-fields';
import { typicalText } from '../try/read-case';

const LEVELS_SHOWN = 12;

/** What a case must say, and what the records cover. */
@Component({
  selector: 'tb-edition-inputs',
  imports: [TableBox],
  template: `
    <tb-table-box label="Inputs">
      <table class="tb-table">
        <caption class="tb-only-read">
          Inputs of the edition
        </caption>
        <thead>
          <tr>
            <th scope="col">Input</th>
            <th scope="col">Unit</th>
            <th scope="col">Recorded</th>
            <th scope="col">Typical</th>
            <th scope="col">If missing</th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.name) {
            <tr>
              <th scope="row">
                {{ row.label }}
                @if (row.help) {
                  <span class="tb-small help">{{ row.help }}</span>
                }
              </th>
              <td>{{ row.unit || '–' }}</td>
              <td>{{ row.covers }}</td>
              <td>{{ row.typical }}</td>
              <td>{{ row.required ? 'refused' : 'taken as typical' }}</td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
  `,
  styles: `
    .help {
      display: block;
      font-weight: 400;
    }
  `,
})
export class EditionInputs {
  readonly inputSchema = input.required<Edition['inputSchema']>();

  protected readonly rows = computed(() =>
    caseFields(this.inputSchema()).map((field) => ({
      ...field,
      covers: covers(field),
      typical: typicalText(field) || '–',
    })),
  );
}

function covers({ range, days, levels, otherLevels, kind }: CaseField): string {
  if (levels.length > LEVELS_SHOWN)
    return `${levels.slice(0, LEVELS_SHOWN).join('; ')} and ${levels.length - LEVELS_SHOWN} more`;
  if (levels.length > 0) return levels.join('; ') + (otherLevels ? '; others are taken too' : '');
  if (range && kind === 'number')
    return `${formatReading(range.least, 'en-GB')} to ${formatReading(range.greatest, 'en-GB')}`;
  return days ? `${formatDay(days.first)} to ${formatDay(days.last)}` : '–';
}
