/** Everything that is drawn, in pixels of the picture; y grows downward. */
export interface BeamLayout {
  readonly width: number;
  readonly height: number;
  readonly tiltDegrees: number;
  readonly pivot: Point;
  readonly level: Segment;
  readonly beam: Segment;
  readonly ticks: readonly BeamTick[];
  readonly weights: readonly BeamWeight[];
  /** Lowest point of the ticks' rules. */
  readonly rulesTo: number;
  /** Σc over all inputs, drawn or not. */
  readonly sum: number;
  /** How many inputs the load "the others" stands for; 0 when every input is drawn. */
  readonly gatheredCount: number;
}

export interface Point {
  readonly x: number;
  readonly y: number;
}

export interface Segment {
  readonly x1: number;
  readonly y1: number;
  readonly x2: number;
  readonly y2: number;
}

export interface BeamTick {
  readonly x: number;
  readonly arm: number;
}

export type Hanging = 'load' | 'float';
export type Movement = 'raises' | 'lowers' | 'nothing';

export interface BeamWeight {
  readonly input: string;
  readonly hangs: Hanging;
  readonly moves: Movement;
  readonly lane: number;
  readonly arm: number;
  readonly mass: number;
  readonly contribution: number;
  /** The box; its middle is the arm, its width the mass. */
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  readonly figure: string;
  /** As drawn: shortened where there is no room. */
  readonly label: string;
  readonly fullLabel: string;
  readonly labelX: number;
  readonly labelAnchor: 'start' | 'end';
  readonly rope: Segment;
}
