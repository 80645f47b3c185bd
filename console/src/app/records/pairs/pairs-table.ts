import { Component, computed, input, output } from '@angular/core';
import { MatSortModule } from '@angular/material/sort';
import { CountPipe } from '../../ui/figure-pipes';
import { listView } from '../../ui/list-view';
import { Pager } from '../../ui/pager';
import type { Pair } from '../../ui/plots/correlation-map';
import { TableBox } from '../../ui/table-box';
import { PairRow, correlationWords } from './pair-words';

/** Every pair of the correlation map, the closest first. */
@Component({
  selector: 'tb-pairs-table',
  imports: [CountPipe, MatSortModule, Pager, TableBox],
  template: `
    <tb-table-box label="Pairs of columns">
      <table
        class="tb-table"
        matSort
        matSortDisableClear
        [matSortActive]="view.sort().active"
        [matSortDirection]="view.sort().direction"
        (matSortChange)="view.sortBy($event)"
      >
        <thead>
          <tr>
            <th scope="col" mat-sort-header="x">Column</th>
            <th scope="col" mat-sort-header="y">With</th>
            <th scope="col" class="tb-figure" mat-sort-header="strength" start="desc">Correlation</th>
            <th scope="col" class="tb-figure" mat-sort-header="count" start="desc">Rows with both</th>
            <th scope="col"><span class="tb-only-read">Scatter</span></th>
          </tr>
        </thead>
        <tbody>
          @for (row of rows(); track row.pair) {
            <tr>
              <th scope="row">{{ row.pair.x }}</th>
              <td>{{ row.pair.y }}</td>
              <td class="tb-figure">{{ row.correlation }}</td>
              <td class="tb-figure">{{ row.pair.count | count }}</td>
              <td class="tb-figure">
                <button type="button" class="tb-quiet-button" (click)="choose.emit({ x: row.pair.x, y: row.pair.y })">
                  Show<span class="tb-only-read"> {{ row.pair.y }} against {{ row.pair.x }}</span>
                </button>
              </td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
    <tb-pager noun="pairs" [total]="view.total()" [offset]="view.offset()" (moved)="view.moveTo($event)" />
  `,
})
export class PairsTable {
  readonly pairs = input.required<readonly PairRow[]>();
  readonly choose = output<Pair>();

  protected readonly view = listView(() => this.pairs(), {
    sortKeys: {
      x: (pair: PairRow) => pair.x,
      y: (pair: PairRow) => pair.y,
      strength: (pair: PairRow) => pair.strength,
      count: (pair: PairRow) => pair.count,
    },
    firstSort: { active: 'strength', direction: 'desc' },
  });
  protected readonly rows = computed(() =>
    this.view.rows().map((pair) => ({ pair, correlation: correlationWords(pair.correlation) })),
  );
}
