import { Component, input } from '@angular/core';
import { heldOutFrame, type HeldOutPlot } from './held-out-plot';

/** The drawing of held-out estimates; its frame gives it a title and a table. */
@Component({
  selector: 'tb-held-out-scatter',
  templateUrl: './held-out-scatter.html',
  styleUrl: '../../ui/plots/plot.scss',
})
export class HeldOutScatter {
  readonly plot = input.required<HeldOutPlot>();
  readonly acrossLabel = input.required<string>();
  readonly upLabel = input.required<string>();
  readonly name = input.required<string>();
  readonly description = input.required<string>();

  protected readonly frame = heldOutFrame;
  protected readonly box = `0 0 ${heldOutFrame.width} ${heldOutFrame.height}`;
  protected readonly floor = heldOutFrame.height - heldOutFrame.bottom;
  protected readonly end = heldOutFrame.width - heldOutFrame.right;
  protected readonly middle = (heldOutFrame.left + heldOutFrame.width - heldOutFrame.right) / 2;
}
