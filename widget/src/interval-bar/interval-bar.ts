import { ChangeDetectionStrategy, Component, computed, input, ViewEncapsulation } from '@angular/core';
import { BEAM_PAINT } from '../beam-diagram/beam-colours';
import { formatStepped } from '../format/number-format';
import { MeasuredValue, precisionFor } from '../format/precision';
import { layoutIntervalBar } from './layout-interval-bar';

/** The interval as a bar with the estimate on it. The words beside it say the same, so the picture is hidden from readers. */
@Component({
  selector: 'tb-interval-bar',
  templateUrl: './interval-bar.html',
  encapsulation: ViewEncapsulation.None,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class IntervalBar {
  readonly measured = input.required<MeasuredValue>();
  readonly locale = input<string>();

  protected readonly paint = BEAM_PAINT;
  protected readonly bar = computed(() => {
    const precision = precisionFor(this.measured());
    const layout = layoutIntervalBar(this.measured(), precision);
    return (
      layout && {
        ...layout,
        marks: layout.marks.map((mark) => ({
          ...mark,
          x: percent(mark.at),
          text: formatStepped(mark.value, precision.endStep, this.locale()),
          anchor: mark.at < 0.05 ? 'start' : mark.at > 0.95 ? 'end' : 'middle',
        })),
      }
    );
  });

  protected readonly percent = percent;
}

function percent(share: number): string {
  return `${(share * 100).toFixed(2)}%`;
}
