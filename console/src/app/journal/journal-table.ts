import { Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { JournalEntry } from '../api/contract';
import { MomentPipe } from '../ui/moment-pipes';
import { TableBox } from '../ui/table-box';
import { wordsOf } from './journal-words';
import { subjectLink } from './subject-link';

@Component({
  selector: 'tb-journal-table',
  imports: [MomentPipe, RouterLink, TableBox],
  templateUrl: './journal-table.html',
  styleUrl: './journal-table.scss',
})
export class JournalTable {
  readonly entries = input.required<readonly JournalEntry[]>();

  protected readonly wordsOf = wordsOf;
  protected readonly subjectLink = subjectLink;
}
