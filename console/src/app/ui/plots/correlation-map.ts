import { Component, ElementRef, computed, input, output, viewChild } from '@angular/core';

/** Correlations between columns, both ways round. */
export interface CorrelationGrid {
  readonly columns: readonly string[];
  /** Null where one of the two does not vary. */
  readonly correlations: readonly (readonly (number | null)[])[];
}

export interface Pair {
  readonly x: string;
  readonly y: string;
}

interface Cell {
  readonly key: string;
  readonly row: number;
  readonly column: number;
  readonly x: number;
  readonly y: number;
  readonly opposite: boolean;
  /** How strong the ink is, in proportion to |correlation|. */
  readonly ink: number;
  readonly figure: string;
}

/** Figures are written while there are no more columns than this; beyond, cells shrink and the table tells them. */
const COLUMNS_WITH_FIGURES = 30;
const CELL_WITH_FIGURE = 38;
const CELL_ALONE = 18;
/** From here on the figure has its minus sign. */
const LEAST_OPPOSITE = -0.005;
const STRONGEST_SAME = 0.65;
const STRONGEST_OPPOSITE = 0.45;
const HEADROOM = 150;
const LONGEST_NAME = 22;
let mapCount = 0;

/**
 * Squares in the order of the clusters, so that columns which say the same stand together as a block. A square goes the
 * same way, a round goes the opposite way; the stronger the ink, the closer. The drawing is one picture to a screen
 * reader and to the keyboard: the table beside it holds every pair.
 */
@Component({
  selector: 'tb-correlation-map',
  templateUrl: './correlation-map.html',
  styleUrl: './correlation-map.scss',
  host: { '(click)': 'press($event)' },
})
export class CorrelationMap {
  readonly grid = input.required<CorrelationGrid>();
  readonly description = input.required<string>();
  readonly chosen = input<Pair>();
  readonly choose = output<Pair>();

  private readonly drawing = viewChild.required<ElementRef<SVGSVGElement>>('drawing');
  protected readonly id = `tb-correlation-map-${++mapCount}`;
  protected readonly headroom = HEADROOM;
  protected readonly withFigures = computed(() => this.grid().columns.length <= COLUMNS_WITH_FIGURES);
  protected readonly cell = computed(() => (this.withFigures() ? CELL_WITH_FIGURE : CELL_ALONE));
  protected readonly size = computed(() => HEADROOM + this.cell() * this.grid().columns.length + 1);
  protected readonly names = computed(() =>
    this.grid().columns.map((name, index) => ({
      name,
      short: name.length > LONGEST_NAME ? `${name.slice(0, LONGEST_NAME - 1)}…` : name,
      at: HEADROOM + (index + 0.5) * this.cell(),
    })),
  );
  protected readonly cells = computed(() => cellsOf(this.grid(), this.cell()));
  protected readonly chosenPlace = computed(() => {
    const { columns } = this.grid();
    const { x = '', y = '' } = this.chosen() ?? {};
    const [column, row] = [columns.indexOf(x), columns.indexOf(y)];
    if (column < 0 || row < 0) return undefined;
    return { x: HEADROOM + column * this.cell(), y: HEADROOM + row * this.cell() };
  });

  /** A press anywhere on the drawing chooses the cell under it. */
  protected press(event: MouseEvent): void {
    const { left, top, width } = this.drawing().nativeElement.getBoundingClientRect();
    const scale = this.size() / (width || this.size());
    const column = Math.floor(((event.clientX - left) * scale - HEADROOM) / this.cell());
    const row = Math.floor(((event.clientY - top) * scale - HEADROOM) / this.cell());
    const { columns } = this.grid();
    if (column === row || !columns[column] || !columns[row]) return;
    this.choose.emit({ x: columns[column], y: columns[row] });
  }
}

function cellsOf({ columns, correlations }: CorrelationGrid, size: number): readonly Cell[] {
  return columns.flatMap((_, row) =>
    columns.map((_column, column) => {
      const correlation = correlations[row][column];
      return {
        key: `${row}-${column}`,
        row,
        column,
        x: HEADROOM + column * size,
        y: HEADROOM + row * size,
        opposite: (correlation ?? 0) <= LEAST_OPPOSITE,
        ink: inkOf(correlation),
        figure: figureOf(correlation),
      };
    }),
  );
}

/** Held back at its strongest, so that the figure on it stays readable by day and by night. */
function inkOf(correlation: number | null): number {
  if (correlation === null) return 0;
  return Math.abs(correlation) * (correlation < 0 ? STRONGEST_OPPOSITE : STRONGEST_SAME);
}

/** Two decimals, however many of them are noughts, so that figures line up: `0.87`, `−0.30`. */
export function correlationText(correlation: number): string {
  return correlation.toFixed(2).replace(/^-/, correlation > LEAST_OPPOSITE ? '' : '\u2212');
}

/** Without the nought before the point: `.87`, `−.30`. */
export function figureOf(correlation: number | null): string {
  return correlation === null ? '–' : correlationText(correlation).replace(/^(\u2212?)0\./, '$1.');
}
