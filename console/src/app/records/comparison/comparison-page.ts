import { Component, computed, inject, input } from '@angular/core';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { map, switchMap } from 'rxjs';
import { LookingClient } from '../../api/looking-client';
import { RecordsClient } from '../../api/records-client';
import { EmptyState } from '../../ui/empty-state';
import { Field, FieldInput } from '../../ui/field';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { PageHead } from '../../ui/page-head';
import { ProblemNotice } from '../../ui/problem-notice';
import { Sheet } from '../../ui/sheet/sheet';
import { SheetSection } from '../../ui/sheet/sheet-section';
import { comparable, originOf, usualOther } from '../keeping/revision-words';
import { ChangedCells } from './changed-cells';
import { ComparedColumns } from './compared-columns';
import { matchedTold, rowsTold } from './comparison-words';
import { RowsOnOneSide } from './rows-on-one-side';

/** A revision against another of its set: what became of the rows and of each column. */
@Component({
  selector: 'tb-comparison-page',
  imports: [
    ChangedCells,
    ComparedColumns,
    EmptyState,
    Field,
    FieldInput,
    LoadingState,
    PageHead,
    ProblemNotice,
    RouterLink,
    RowsOnOneSide,
    Sheet,
    SheetSection,
  ],
  templateUrl: './comparison-page.html',
  styleUrl: './comparison-page.scss',
})
export class ComparisonPage {
  private readonly records = inject(RecordsClient);
  private readonly looking = inject(LookingClient);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);

  readonly id = input.required<string>();
  /** Of the address: the other revision. Absent, the usual one is taken. */
  readonly with = input<string>();
  /** Of the address: the column that names rows. Absent, one is found; empty, rows go by their order. */
  readonly key = input<string>();

  protected readonly context = load(() => {
    const id = this.id();
    return this.records.readRevision(id).pipe(
      switchMap(({ recordSetId }) => this.records.read(recordSetId)),
      map((recordSet) => ({ recordSet, revision: recordSet.revisions.find((each) => each.id === id) })),
    );
  });
  protected readonly others = computed(() =>
    comparable(this.id(), this.context.value()?.recordSet.revisions ?? []).map((revision) => ({
      id: revision.id,
      words: `Revision ${revision.number}: ${originOf(revision)}`,
    })),
  );
  protected readonly chosenOther = computed(() => {
    const { recordSet, revision } = this.context.value() ?? {};
    return this.with() ?? (recordSet && revision && usualOther(revision, recordSet.revisions)?.id);
  });
  protected readonly comparison = load(() => {
    const other = this.chosenOther();
    return other === undefined ? undefined : this.looking.compare(this.id(), other, this.key());
  });
  protected readonly heading = computed(() => {
    const { recordSet, revision } = this.context.value() ?? {};
    return recordSet && revision ? `${recordSet.name}, revision ${revision.number} compared` : 'Compare revisions';
  });
  protected readonly parent = computed(() => {
    const recordSet = this.context.value()?.recordSet;
    return recordSet
      ? { label: recordSet.name, link: `/records/${recordSet.id}` }
      : { label: 'Records', link: '/records' };
  });
  protected readonly rowsTold = computed(() => {
    const comparison = this.comparison.value();
    return comparison && rowsTold(comparison.rows);
  });
  protected readonly matchedTold = computed(() => {
    const comparison = this.comparison.value();
    return comparison && matchedTold(comparison, this.key());
  });

  /** Another revision finds its own key. */
  protected compareWith(id: string): void {
    this.go({ with: id });
  }

  protected matchBy(key: string): void {
    this.go({ with: this.chosenOther(), key });
  }

  private go(queryParams: Readonly<Record<string, string | undefined>>): void {
    void this.router.navigate([], { relativeTo: this.route, queryParams });
  }
}
