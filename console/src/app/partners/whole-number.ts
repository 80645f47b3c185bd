export type WholeNumberReading = { readonly value: number | null } | { readonly complaint: string };

export interface WholeNumberBounds {
  /** What the number is, as the complaint begins: `Calls a minute`. */
  readonly noun: string;
  readonly most: number;
  readonly optional: boolean;
}

/** Reads a count as people type it: thousands may be set apart by a comma or a space. Empty is null where that is allowed. */
export function readWholeNumber(text: string, { noun, most, optional }: WholeNumberBounds): WholeNumberReading {
  const digits = text.replace(/[\s,\u202f\u00a0]/g, '');
  if (digits === '') return optional ? { value: null } : { complaint: `${noun} must be given, like 60` };
  if (!/^\d+$/.test(digits)) return { complaint: `${noun} must be a whole number, like 60` };
  const value = Number(digits);
  if (value < 1 || value > most) return { complaint: `${noun} must be between 1 and ${most.toLocaleString('en-GB')}` };
  return { value };
}
