import type { SpecificationInput } from '../../api/contract';

/** How an input's reading enters the formula: `length`, `the natural logarithm of length`. */
export function readingWords(column: string, inputs: readonly SpecificationInput[]): string {
  switch (inputs.find((input) => input.column === column)?.transform ?? 'none') {
    case 'none':
      return column;
    case 'log':
      return `the natural logarithm of ${column}`;
    case 'square-root':
      return `the square root of ${column}`;
    case 'spline':
      return `the spline of ${column}`;
  }
}

/** What a weight's term multiplies: a basis column of a spline, or 1 where the reading is missing. */
export function termWords(column: string, term: string): string {
  const basis = /^basis (\d+)$/.exec(term)?.[1];
  if (basis !== undefined) return `basis column ${basis} of the spline of ${column}`;
  return term === 'missing' ? `1 when ${column} is missing, else 0` : `the ${term} of ${column}`;
}
