import { Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { FitUnderWay } from '../api/contract';
import { countOf } from '../ui/figure';
import { FIT_STAMPS } from '../ui/stamps';
import { StatusStamp } from '../ui/status-stamp';

@Component({
  selector: 'tb-fits-under-way',
  imports: [RouterLink, StatusStamp],
  templateUrl: './fits-under-way.html',
  styleUrl: './fits-under-way.scss',
})
export class FitsUnderWay {
  readonly fits = input.required<readonly FitUnderWay[]>();
  protected readonly stamps = FIT_STAMPS;

  protected progressOf({ progress, state }: FitUnderWay): string {
    if (state === 'queued') return 'waiting for its turn';
    if (progress.total === 0) return progress.stage;
    return `${progress.stage}, ${progress.done} of ${countOf(progress.total, 'step')}`;
  }
}
