/** The unit that stands beside a column's name: none where the name carries it already, as in `draught (m)`. */
export function unitBeside(name: string, unit: string | null | undefined): string | undefined {
  return unit && !name.endsWith(`(${unit})`) && !name.endsWith(`[${unit}]`) ? unit : undefined;
}
