import { Component, input } from '@angular/core';

/** Colour of a stamp; its word carries the meaning. */
export type StampTone = 'good' | 'waiting' | 'caution' | 'bad' | 'past';

export interface Stamp {
  readonly word: string;
  readonly tone: StampTone;
}

@Component({
  selector: 'tb-status-stamp',
  template: '{{ stamp().word }}',
  styleUrl: './status-stamp.scss',
  host: { '[class]': 'stamp().tone' },
})
export class StatusStamp {
  readonly stamp = input.required<Stamp>();
}
