import type { ColumnKind, RecordColumn } from '../../api/contract';
import { isoDayOf } from '../../ui/moment';
import { columnInFormula } from '../mending/formula-complaint';

/**
 * Conditions on rows as the service reads them: columns in [square brackets], texts in "double quotes", a closing
 * bracket or a quotation mark inside a name or a text written twice.
 */

/** The service takes no longer condition. */
const LONGEST_CONDITION = 500;

type Named = Pick<RecordColumn, 'name' | 'kind'>;

function textIn(text: string): string {
  return `"${text.replaceAll('"', '""')}"`;
}

/** Undefined when it is longer than the service takes. */
function whole(condition: string): string | undefined {
  return condition.length > LONGEST_CONDITION ? undefined : condition;
}

/**
 * A reading, with every digit that tells it from its neighbours. Days are whole and bounds need not be: day ≤ bound
 * exactly when day ≤ ⌊bound⌋, day ≥ bound exactly when day ≥ ⌈bound⌉, and likewise for > and <.
 */
function readingIn(value: number, kind: ColumnKind): string {
  return kind === 'date' ? textIn(isoDayOf(value)) : String(value);
}

export function missingIn({ name }: Named): string | undefined {
  return whole(`${columnInFormula(name)} is missing`);
}

export function levelIn({ name }: Named, level: string): string | undefined {
  return whole(`${columnInFormula(name)} = ${textIn(level)}`);
}

/** Rows that have a level, and none of these. */
export function otherLevelsIn({ name }: Named, levels: readonly string[]): string | undefined {
  return whole(levels.map((level) => `${columnInFormula(name)} <> ${textIn(level)}`).join(' and '));
}

export function equalIn({ name, kind }: Named, value: number): string | undefined {
  return whole(`${columnInFormula(name)} = ${readingIn(value, kind)}`);
}

export function atMostIn({ name, kind }: Named, value: number): string | undefined {
  return whole(`${columnInFormula(name)} <= ${readingIn(lowered(value, kind), kind)}`);
}

export function outsideIn({ name, kind }: Named, low: number, high: number): string | undefined {
  const column = columnInFormula(name);
  const [below, above] = [readingIn(raised(low, kind), kind), readingIn(lowered(high, kind), kind)];
  return whole(`${column} < ${below} or ${column} > ${above}`);
}

function lowered(bound: number, kind: ColumnKind): number {
  return kind === 'date' ? Math.floor(bound) : bound;
}

function raised(bound: number, kind: ColumnKind): number {
  return kind === 'date' ? Math.ceil(bound) : bound;
}

export interface Stretch {
  readonly from: number;
  readonly to: number;
  /** The last bar of a histogram holds its upper end too. */
  readonly closed: boolean;
}

export function stretchIn({ name, kind }: Named, { from, to, closed }: Stretch): string | undefined {
  const edge = (value: number): string => readingIn(raised(value, kind), kind);
  const column = columnInFormula(name);
  return whole(`${column} >= ${edge(from)} and ${column} ${closed ? '<=' : '<'} ${edge(to)}`);
}

const PIECES = /\[((?:[^\]]|\]\])+)\]|"((?:[^"]|"")*)"|<=|>=|<>|!=|[<>=]|[^["<>=!]+|./g;
const SIGN_WORDS: Readonly<Record<string, string>> = {
  '<=': 'at most',
  '>=': 'at least',
  '<>': 'is not',
  '!=': 'is not',
  '<': 'below',
  '>': 'above',
  '=': 'is',
};

/** The condition as a person would say it; what this does not know stands as it was written. */
export function conditionWords(condition: string): string {
  return condition.replace(PIECES, (piece: string, name?: string, text?: string) => {
    if (name !== undefined) return name.replaceAll(']]', ']').trim();
    if (text !== undefined) return `“${text.replaceAll('""', '"')}”`;
    return SIGN_WORDS[piece] ?? piece;
  });
}
