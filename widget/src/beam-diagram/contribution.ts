/** One input's place on the beam. contribution = arm × mass for a load, −arm × mass for a float. */
export interface BeamContribution {
  readonly input: string;
  readonly label?: string;
  /** How far the case is from typical, signed. */
  readonly arm: number;
  /** Weighted standard deviation of the input's contribution over the records. */
  readonly mass: number;
  /** What the input adds to estimate minus typical, on the scale that the model adds on. */
  readonly contribution: number;
  /** A numeric input with a negative weight: it hangs at its distance from typical and lifts. */
  readonly float?: boolean;
}

/** What the beam is drawn from. Contributions sum to value − typical; on the log scale to log value − log typical. */
export interface BeamEvaluation {
  readonly value: number;
  readonly typical: number;
  readonly unit: string;
  readonly scale: 'original' | 'log';
  readonly interval: { readonly low: number | null; readonly high: number | null };
  readonly contributions: readonly BeamContribution[];
}

export function labelOf({ label, input }: BeamContribution): string {
  return label ?? input;
}

export function sumOf(contributions: readonly BeamContribution[]): number {
  return contributions.reduce((sum, { contribution }) => sum + contribution, 0);
}
