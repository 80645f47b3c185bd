import type { Weight } from '../../api/contract';

/** The weights of one input: one for a number, several for a category's levels or a spline's basis columns. */
export interface WeightGroup {
  readonly input: string;
  readonly parts: readonly WeightPart[];
  /** Root of the sum of squares of the standardised weights; sets the order. */
  readonly size: number;
}

export interface WeightPart {
  /** Empty for a plain number. */
  readonly name: string;
  readonly value: number;
  readonly standardised: number;
  readonly standardError: number | null;
}

/** Groups keep a category's levels together under their input; the heaviest input comes first. */
export function weightGroups(weights: readonly Weight[]): readonly WeightGroup[] {
  const parts = new Map<string, WeightPart[]>();
  for (const weight of weights) {
    const part = {
      name: weight.level ?? weight.term ?? '',
      value: weight.value,
      standardised: weight.standardised,
      standardError: weight.standardError ?? null,
    };
    const known = parts.get(weight.input);
    if (known) known.push(part);
    else parts.set(weight.input, [part]);
  }
  return [...parts]
    .map(([input, ofInput]) => ({
      input,
      parts: ofInput,
      size: Math.hypot(...ofInput.map((part) => part.standardised)),
    }))
    .sort((left, right) => right.size - left.size);
}

/** Inputs that the fit dropped: every weight is exactly 0. */
export function droppedInputs(groups: readonly WeightGroup[]): readonly string[] {
  return groups.filter((group) => group.parts.every((part) => part.value === 0)).map((group) => group.input);
}
