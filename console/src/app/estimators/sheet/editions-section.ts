import { Component, computed, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import { EditionsClient } from '../../api/editions-client';
import { everyItem } from '../../api/page';
import { formatFigure } from '../../ui/figure';
import { load } from '../../ui/load';
import { LoadingState } from '../../ui/loading-state';
import { DayPipe } from '../../ui/moment-pipes';
import { ProblemNotice } from '../../ui/problem-notice';
import { EDITION_STAMPS } from '../../ui/stamps';
import { StatusStamp } from '../../ui/status-stamp';
import { TableBox } from '../../ui/table-box';

/** Every edition, newest first: state, change note, and who approved it. */
@Component({
  selector: 'tb-editions-section',
  imports: [DayPipe, LoadingState, ProblemNotice, RouterLink, StatusStamp, TableBox],
  templateUrl: './editions-section.html',
  styleUrl: './editions-section.scss',
})
export class EditionsSection {
  private readonly client = inject(EditionsClient);

  readonly slug = input.required<string>();

  protected readonly editions = load(() => everyItem((page) => this.client.list(this.slug(), page)));
  protected readonly rows = computed(() =>
    [...(this.editions.value() ?? [])]
      .sort((left, right) => right.number - left.number)
      .map((edition) => ({ ...edition, error: formatFigure(edition.rmse, { significant: 3, unit: edition.unit }) })),
  );
  protected readonly stamps = EDITION_STAMPS;
}
