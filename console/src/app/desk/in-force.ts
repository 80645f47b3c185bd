import { Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { EditionSummary } from '../api/contract';
import { CountPipe, FigurePipe } from '../ui/figure-pipes';
import { DayPipe } from '../ui/moment-pipes';
import { TableBox } from '../ui/table-box';

/** What partners get when they ask today. */
@Component({
  selector: 'tb-in-force',
  imports: [CountPipe, DayPipe, FigurePipe, RouterLink, TableBox],
  templateUrl: './in-force.html',
})
export class InForce {
  readonly editions = input.required<readonly EditionSummary[]>();
}
