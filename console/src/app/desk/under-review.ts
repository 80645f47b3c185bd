import { Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { EditionSummary } from '../api/contract';
import { FigurePipe } from '../ui/figure-pipes';
import { MomentPipe } from '../ui/moment-pipes';
import { TableBox } from '../ui/table-box';

/** Editions that a reviewer has yet to read. */
@Component({
  selector: 'tb-under-review',
  imports: [FigurePipe, MomentPipe, RouterLink, TableBox],
  templateUrl: './under-review.html',
})
export class UnderReview {
  readonly editions = input.required<readonly EditionSummary[]>();
}
