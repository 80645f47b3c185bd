import { Component, input, output } from '@angular/core';
import type { Key } from '../api/contract';
import { CountPipe } from '../ui/figure-pipes';
import { DayPipe, MomentPipe } from '../ui/moment-pipes';
import { StatusStamp } from '../ui/status-stamp';
import { TableBox } from '../ui/table-box';
import { KEY_KIND_NAMES, KEY_STAMPS } from './key-words';

@Component({
  selector: 'tb-keys-table',
  imports: [CountPipe, DayPipe, MomentPipe, StatusStamp, TableBox],
  templateUrl: './keys-table.html',
  styleUrl: './keys-table.scss',
})
export class KeysTable {
  readonly keys = input.required<readonly Key[]>();
  readonly mayKeep = input(false);
  readonly revoked = output<Key>();

  protected readonly kindNames = KEY_KIND_NAMES;
  protected readonly stamps = KEY_STAMPS;
}
