import { Component, computed, inject, input, output } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { RecordSetDetail } from '../api/contract';
import { BytesPipe, CountPipe } from '../ui/figure-pipes';
import { MomentPipe } from '../ui/moment-pipes';
import { SheetMenu } from '../ui/sheet/sheet-menu';
import { TableBox } from '../ui/table-box';
import { RevisionActions } from './keeping/revision-actions';
import { lackingOf, originOf } from './keeping/revision-words';

/** A set's revisions, newest first: where each came from and what can be done with it. */
@Component({
  selector: 'tb-revisions-table',
  imports: [BytesPipe, CountPipe, MomentPipe, RouterLink, SheetMenu, TableBox],
  templateUrl: './revisions-table.html',
  styleUrl: './revisions-table.scss',
})
export class RevisionsTable {
  private readonly actions = inject(RevisionActions);

  readonly recordSet = input.required<RecordSetDetail>();
  /** A revision has been deleted, so the set is not what it was. */
  readonly changed = output();

  protected readonly rows = computed(() => {
    const { id, name, revisions } = this.recordSet();
    return [...revisions]
      .sort((a, b) => b.number - a.number)
      .map((revision) => ({
        revision,
        origin: originOf(revision),
        lacking: lackingOf(revision),
        menu: this.actions.menuOf({
          revision,
          recordSetId: id,
          recordSetName: name,
          gone: () => this.changed.emit(),
        }),
      }));
  });
}
