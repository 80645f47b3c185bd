import { Component, inject, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { JournalEntry } from '../api/contract';
import { SessionStore } from '../api/session-store';
import { MomentPipe } from '../ui/moment-pipes';

/** The newest entries of the journal. */
@Component({
  selector: 'tb-lately',
  imports: [MomentPipe, RouterLink],
  templateUrl: './lately.html',
  styleUrl: './lately.scss',
})
export class Lately {
  readonly entries = input.required<readonly JournalEntry[]>();
  protected readonly session = inject(SessionStore);
}
