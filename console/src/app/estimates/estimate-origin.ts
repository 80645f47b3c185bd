import { Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';
import type { EstimateRecord } from '../api/contract';
import { CountPipe } from '../ui/figure-pipes';
import { MomentPipe } from '../ui/moment-pipes';

/** Which edition gave the number, from which records, who approved it, and who asked. */
@Component({
  selector: 'tb-estimate-origin',
  imports: [CountPipe, MomentPipe, RouterLink],
  templateUrl: './estimate-origin.html',
})
export class EstimateOrigin {
  readonly estimate = input.required<EstimateRecord>();
}
