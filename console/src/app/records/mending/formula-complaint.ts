/** What the service says about a formula, taken apart at the character (from 1) that it names. */
export interface FormulaComplaint {
  readonly words: string;
  /** The formula around the place; undefined where no place was named. */
  readonly place?: { readonly before: string; readonly at: string; readonly after: string; readonly character: number };
}

export function formulaComplaint(reason: string, formula: string): FormulaComplaint {
  const named = /^(.*?)\s*\(at character (\d+)\)\s*\.?$/s.exec(reason);
  if (!named) return { words: reason };
  const start = firstVisible(formula, Number(named[2]) - 1);
  return {
    words: named[1],
    place: {
      before: formula.slice(0, start),
      // Past its end the formula breaks off: a space shows where.
      at: formula.charAt(start) || '\u00a0',
      after: formula.slice(start + 1),
      character: start + 1,
    },
  };
}

/** The place itself, or what follows the space there. */
function firstVisible(formula: string, index: number): number {
  const place = Math.min(Math.max(index, 0), formula.length);
  const visible = formula.slice(place).search(/\S/);
  return visible < 0 ? place : place + visible;
}

/** A column as a formula names it; a bracket that belongs to the name is written twice. */
export function columnInFormula(name: string): string {
  return `[${name.replaceAll(']', ']]')}]`;
}
