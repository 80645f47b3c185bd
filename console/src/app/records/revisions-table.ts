import { Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RevisionSummary } from '../api/contract';
import { BytesPipe, CountPipe } from '../ui/figure-pipes';
import { MomentPipe } from '../ui/moment-pipes';
import { TableBox } from '../ui/table-box';

@Component({
  selector: 'tb-revisions-table',
  imports: [BytesPipe, CountPipe, MomentPipe, RouterLink, TableBox],
  template: `
    <tb-table-box label="Revisions">
      <table class="tb-table tb-wide">
        <thead>
          <tr>
            <th scope="col">Revision</th>
            <th scope="col">File</th>
            <th scope="col" class="tb-figure">Rows</th>
            <th scope="col" class="tb-figure">Columns</th>
            <th scope="col" class="tb-figure">Size</th>
            <th scope="col">Brought in</th>
            <th scope="col">SHA-256 begins</th>
          </tr>
        </thead>
        <tbody>
          @for (revision of revisions(); track revision.id) {
            <tr>
              <th scope="row">
                <a [routerLink]="['/records/revisions', revision.id]">Revision {{ revision.number }}</a>
              </th>
              <td>{{ revision.fileName }}</td>
              <td class="tb-figure">{{ revision.rowCount | count }}</td>
              <td class="tb-figure">{{ revision.columnCount | count }}</td>
              <td class="tb-figure">{{ revision.byteCount | bytes }}</td>
              <td>
                {{ revision.createdBy.name }}<br /><span class="tb-muted">{{ revision.createdAt | moment }}</span>
              </td>
              <td>
                <code>{{ revision.sha256.slice(0, 12) }}</code>
              </td>
            </tr>
          }
        </tbody>
      </table>
    </tb-table-box>
  `,
})
export class RevisionsTable {
  readonly revisions = input.required<readonly RevisionSummary[]>();
}
