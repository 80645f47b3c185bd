import type { RecordColumn, RecordTable } from '../../regression/records';
import { DateForm, DateReader } from '../reading/date-cell';
import { parseFormula, type Arithmetic, type Comparison, type FormulaNode } from './formula-parser';
import { FormulaError } from './formula-tokens';

type NumberOf = (row: number) => number;
type TextOf = (row: number) => string | null;
type TruthOf = (row: number) => boolean;

/** A formula bound to a table's columns. Numbers: NaN is missing; dates are days since 1970-01-01. */
export type BoundFormula =
  | { readonly kind: 'number' | 'date'; readonly of: NumberOf }
  | { readonly kind: 'text'; readonly of: TextOf; readonly literal?: string }
  | { readonly kind: 'truth'; readonly of: TruthOf };

const millisecondsPerDay = 86_400_000;
const dateParts = (days: number): Date => new Date(days * millisecondsPerDay);

interface FormulaFunction {
  readonly takes: 'number' | 'date';
  /** Least and most arguments. */
  readonly count: readonly [number, number];
  readonly apply: (...given: number[]) => number;
}

const functions: Readonly<Record<string, FormulaFunction>> = {
  log: { takes: 'number', count: [1, 1], apply: Math.log },
  log10: { takes: 'number', count: [1, 1], apply: Math.log10 },
  exp: { takes: 'number', count: [1, 1], apply: Math.exp },
  sqrt: { takes: 'number', count: [1, 1], apply: Math.sqrt },
  abs: { takes: 'number', count: [1, 1], apply: Math.abs },
  round: { takes: 'number', count: [1, 1], apply: Math.round },
  min: { takes: 'number', count: [2, 10], apply: Math.min },
  max: { takes: 'number', count: [2, 10], apply: Math.max },
  year: { takes: 'date', count: [1, 1], apply: (days) => dateParts(days).getUTCFullYear() },
  month: { takes: 'date', count: [1, 1], apply: (days) => dateParts(days).getUTCMonth() + 1 },
};

const arithmetic: Readonly<Record<Arithmetic, (a: number, b: number) => number>> = {
  '+': (a, b) => a + b,
  '-': (a, b) => a - b,
  '*': (a, b) => a * b,
  '/': (a, b) => a / b,
  '^': (a, b) => a ** b,
};

/** With a missing side every comparison is false. */
const comparisons: Readonly<Record<Comparison, (a: number | string, b: number | string) => boolean>> = {
  '=': (a, b) => a === b,
  '<>': (a, b) => a !== b,
  '<': (a, b) => a < b,
  '<=': (a, b) => a <= b,
  '>': (a, b) => a > b,
  '>=': (a, b) => a >= b,
};

/** Infinite and undefined results are missing, not numbers. */
const finite = (value: number): number => (Number.isFinite(value) ? value : NaN);

function bindColumn(column: RecordColumn): BoundFormula {
  if (column.kind === 'category') return { kind: 'text', of: (row) => column.levels[column.codes[row]] ?? null };
  if (column.kind === 'text') return { kind: 'text', of: (row) => column.values[row] };
  return { kind: column.kind === 'date' ? 'date' : 'number', of: (row) => column.values[row] };
}

class Binder {
  constructor(private readonly table: RecordTable) {}

  bind(node: FormulaNode): BoundFormula {
    switch (node.kind) {
      case 'number':
        return { kind: 'number', of: () => node.value };
      case 'text':
        return { kind: 'text', of: () => node.value, literal: node.value };
      case 'column':
        return bindColumn(this.column(node.name, node.at));
      case 'arithmetic':
        return this.arithmetic(node);
      case 'comparison':
        return this.comparison(node);
      case 'junction': {
        const [left, right] = [this.truth(node.left, node.at), this.truth(node.right, node.at)];
        return {
          kind: 'truth',
          of: node.word === 'and' ? (row) => left(row) && right(row) : (row) => left(row) || right(row),
        };
      }
      case 'not': {
        const of = this.truth(node.of, node.at);
        return { kind: 'truth', of: (row) => !of(row) };
      }
      case 'missing': {
        const bound = this.bind(node.of);
        return { kind: 'truth', of: (row) => bound.of(row) === null || Number.isNaN(bound.of(row)) };
      }
      case 'call':
        return this.call(node);
    }
  }

  truth(node: FormulaNode, at: number): TruthOf {
    const bound = this.bind(node);
    if (bound.kind !== 'truth') throw new FormulaError('A condition is needed here, such as length > 20', at);
    return bound.of;
  }

  number(node: FormulaNode, at: number, kind: 'number' | 'date' = 'number'): NumberOf {
    const bound = this.bind(node);
    if (bound.kind !== kind) throw new FormulaError(`A ${kind} is needed here`, at);
    return bound.of as NumberOf;
  }

  private column(name: string, at: number): RecordColumn {
    const found = this.table.columns.find((column) => column.name === name);
    if (!found)
      throw new FormulaError(`There is no column ${name}; write names of several words in [square brackets]`, at);
    return found;
  }

  private arithmetic(node: Extract<FormulaNode, { kind: 'arithmetic' }>): BoundFormula {
    const [left, right] = [this.number(node.left, node.at), this.number(node.right, node.at)];
    const apply = arithmetic[node.sign];
    return { kind: 'number', of: (row) => finite(apply(left(row), right(row))) };
  }

  private comparison(node: Extract<FormulaNode, { kind: 'comparison' }>): BoundFormula {
    let [left, right] = [this.bind(node.left), this.bind(node.right)];
    if (left.kind === 'date') right = asDate(right, node.at);
    else if (right.kind === 'date') left = asDate(left, node.at);
    if (left.kind === 'truth' || left.kind !== right.kind)
      throw new FormulaError('The two sides cannot be compared: one is a number, the other is not', node.at);
    const holds = comparisons[node.sign];
    return {
      kind: 'truth',
      of: (row) => {
        const [a, b] = [left.of(row), right.of(row)] as (number | string | null)[];
        return a !== null && b !== null && !Number.isNaN(a) && !Number.isNaN(b) && holds(a, b);
      },
    };
  }

  private call({ name, given, at }: Extract<FormulaNode, { kind: 'call' }>): BoundFormula {
    const known = Object.hasOwn(functions, name) ? functions[name] : undefined;
    if (!known)
      throw new FormulaError(`There is no function ${name}; there are ${Object.keys(functions).join(', ')}`, at);
    const [least, most] = known.count;
    if (given.length < least || given.length > most)
      throw new FormulaError(`${name} takes ${least === most ? least : `${least} to ${most}`} values`, at);
    const values = given.map((node) => this.number(node, at, known.takes));
    return { kind: 'number', of: (row) => finite(known.apply(...values.map((value) => value(row)))) };
  }
}

/** A date is compared with another or with a text such as "2026-03-01". */
function asDate(bound: BoundFormula, at: number): BoundFormula {
  if (bound.kind === 'date') return bound;
  const dates = new DateReader();
  if (bound.kind !== 'text' || bound.literal === undefined || !(dates.read(bound.literal) & DateForm.iso)) {
    throw new FormulaError(
      'A date is compared with another date or with one in quotation marks, such as "2026-03-01"',
      at,
    );
  }
  const days = dates.valueOf(DateForm.iso);
  return { kind: 'date', of: () => days };
}

/** A condition on rows. */
export const bindCondition = (formula: string, table: RecordTable): TruthOf =>
  new Binder(table).truth(parseFormula(formula), 1);

/** A number for each row. */
export const bindNumber = (formula: string, table: RecordTable): NumberOf =>
  new Binder(table).number(parseFormula(formula), 1);
