import { Component, input } from '@angular/core';
import { penaltyPathFrame, type PenaltyPathPlot } from './penalty-path-plot';

/** The drawing of the penalty path; its frame gives it a title and a table. */
@Component({
  selector: 'tb-penalty-path',
  templateUrl: './penalty-path.html',
  styleUrl: '../../ui/plots/plot.scss',
})
export class PenaltyPath {
  readonly plot = input.required<PenaltyPathPlot>();
  readonly weightLabel = input.required<string>();
  readonly name = input.required<string>();
  readonly description = input.required<string>();

  protected readonly frame = penaltyPathFrame;
  protected readonly box = `0 0 ${penaltyPathFrame.width} ${penaltyPathFrame.height}`;
  protected readonly floor = penaltyPathFrame.height - penaltyPathFrame.bottom;
  protected readonly end = penaltyPathFrame.width - penaltyPathFrame.right;
  protected readonly middle = (penaltyPathFrame.left + penaltyPathFrame.width - penaltyPathFrame.right) / 2;

  /** Long names are cut; the table has them whole. */
  protected shortened(name: string): string {
    return name.length > 20 ? `${name.slice(0, 19)}…` : name;
  }
}
