import { Component, ElementRef, computed, input, output, viewChild } from '@angular/core';
import { PlotVariable, axisLabel, axisScale, axisTicks } from './plot-axis';

export interface ScatterPoint {
  readonly x: number;
  readonly y: number;
  readonly row: number;
}

const WIDTH = 640;
const HEIGHT = 440;
const LEFT = 84;
const RIGHT = 28;
const TOP = 32;
const FLOOR = HEIGHT - 48;
/** A press further from every point than this, in units of the drawing, chooses none. */
const REACH = 24;
const TICKS_OF_DATES = 4;
const TICKS_OF_FIGURES = 6;

/** Two columns against each other. A press takes the nearest point; the table beside it holds them for the keyboard. */
@Component({
  selector: 'tb-scatter-plot',
  templateUrl: './scatter-plot.html',
  styleUrls: ['./plot.scss', './scatter-plot.scss'],
  host: { '(click)': 'press($event)' },
})
export class ScatterPlot {
  readonly points = input.required<readonly ScatterPoint[]>();
  readonly x = input.required<PlotVariable>();
  readonly y = input.required<PlotVariable>();
  readonly description = input.required<string>();
  readonly chosen = input<ScatterPoint>();
  readonly choose = output<ScatterPoint>();

  private readonly drawing = viewChild.required<ElementRef<SVGSVGElement>>('drawing');
  protected readonly box = `0 0 ${WIDTH} ${HEIGHT}`;
  protected readonly left = LEFT;
  protected readonly end = WIDTH - RIGHT;
  protected readonly floor = FLOOR;
  protected readonly foot = HEIGHT - 8;
  protected readonly middle = (LEFT + WIDTH - RIGHT) / 2;
  private readonly across = computed(() =>
    axisScale(
      this.points().map(({ x }) => x),
      [LEFT, WIDTH - RIGHT],
    ),
  );
  private readonly up = computed(() =>
    axisScale(
      this.points().map(({ y }) => y),
      [FLOOR, TOP],
    ),
  );
  protected readonly acrossTicks = computed(() =>
    axisTicks(this.across(), this.x().date ? TICKS_OF_DATES : TICKS_OF_FIGURES, this.x().date),
  );
  protected readonly upTicks = computed(() => axisTicks(this.up(), TICKS_OF_FIGURES, this.y().date));
  protected readonly acrossLabel = computed(() => axisLabel(this.x()));
  protected readonly upLabel = computed(() => axisLabel(this.y()));
  protected readonly places = computed(() => this.points().map((point) => this.placeOf(point)));
  protected readonly chosenPlace = computed(() => {
    const chosen = this.chosen();
    return chosen && this.placeOf(chosen);
  });

  protected press(event: MouseEvent): void {
    const { left, top, width } = this.drawing().nativeElement.getBoundingClientRect();
    const scale = WIDTH / (width || WIDTH);
    const nearest = this.nearestTo((event.clientX - left) * scale, (event.clientY - top) * scale);
    if (nearest) this.choose.emit(nearest);
  }

  private nearestTo(across: number, up: number): ScatterPoint | undefined {
    let nearest: ScatterPoint | undefined;
    let least = REACH;
    this.places().forEach((place, index) => {
      const distance = Math.hypot(place.across - across, place.up - up);
      if (distance > least) return;
      least = distance;
      nearest = this.points()[index];
    });
    return nearest;
  }

  private placeOf({ x, y }: ScatterPoint): { readonly across: number; readonly up: number } {
    return { across: this.across()(x), up: this.up()(y) };
  }
}
