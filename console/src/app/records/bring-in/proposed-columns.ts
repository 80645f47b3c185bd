import { Component, computed, inject, input, signal } from '@angular/core';
import type { ReadingProposal } from '../../api/contract';
import { Announcer } from '../../ui/announcer';
import { Field, FieldInput } from '../../ui/field';
import { CountPipe } from '../../ui/figure-pipes';
import { ListView, listView } from '../../ui/list-view';
import { Pager, ROWS_A_PAGE } from '../../ui/pager';
import { TableBox } from '../../ui/table-box';
import { ColumnControls } from './column-controls';
import { ColumnRow, columnRow } from './column-row';
import { ProposedReading } from './proposed-reading';

/** Every column of the file, how it would be read, and what was seen in it. */
@Component({
  selector: 'tb-proposed-columns',
  imports: [ColumnControls, CountPipe, Field, FieldInput, Pager, TableBox],
  templateUrl: './proposed-columns.html',
  styleUrl: './proposed-columns.scss',
})
export class ProposedColumns {
  private readonly announcer = inject(Announcer);

  readonly reading = input.required<ProposedReading>();
  readonly proposal = input.required<ReadingProposal>();

  private readonly all = computed(() => {
    const { columns, appending } = this.proposal();
    const additional = appending ? new Set(appending.additional) : undefined;
    const { choices, complaints } = this.reading();
    return columns.map((column) => columnRow(column, choices(), complaints(), additional));
  });
  protected readonly doubtful = computed(() => this.all().filter((row) => row.wantsALook));
  /** The columns that are shown alone, as they were when that was asked for: a mended one does not vanish underhand. */
  protected readonly shownAlone = signal<ReadonlySet<string> | undefined>(undefined);
  protected readonly isLong = computed(() => this.all().length > ROWS_A_PAGE);
  protected readonly view: ListView<ColumnRow> = listView(() => this.shown(), {
    sortKeys: {},
    firstSort: { active: '', direction: '' },
    words: ({ name }) => name,
  });
  protected readonly appendedTo = computed(() => this.proposal().appending?.revision.number);

  protected showAlone(only: boolean): void {
    this.shownAlone.set(only ? new Set(this.doubtful().map(({ name }) => name)) : undefined);
  }

  protected showAll(): void {
    this.view.filterBy('');
    this.shownAlone.set(undefined);
  }

  protected reset(): void {
    this.reading().reset();
    this.announcer.say('Your choices were taken back.');
  }

  private shown(): readonly ColumnRow[] {
    const alone = this.shownAlone();
    return alone ? this.all().filter(({ name }) => alone.has(name)) : this.all();
  }
}
