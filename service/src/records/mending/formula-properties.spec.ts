import fc from 'fast-check';
import type { RecordTable } from '../../regression/records';
import { bindNumber } from './formula-evaluation';
import { parseFormula, type FormulaNode } from './formula-parser';
import { FormulaError, maximumFormulaLength } from './formula-tokens';

/** What a formula may be made of, so that random ones get past the first character. */
const pieces = ['(', ')', '[', ']', '"', '""', ']]', '+', '-', '*', '/', '^', '=', '<>', '!=', '<=', '>', ',', ' ']
  .concat([
    'and',
    'or',
    'not',
    'is',
    'missing',
    'log',
    'min(',
    '1',
    '.5',
    '1e9',
    '1e',
    'length',
    '[beam (m)]',
    'é',
    '\u0000',
  ])
  .concat(['constructor', '__proto__', '\n', '\u2028', '$', ';', '`', '${', '\\']);

const numberNode = fc
  .oneof(fc.integer({ min: 0, max: 1_000_000 }), fc.double({ min: 0, max: 1e30, noNaN: true }))
  .map((value): FormulaNode => ({ kind: 'number', value: Math.abs(value) }));
const columnNode = fc
  .oneof(
    fc.constantFrom('length', 'beam (m)', ']', 'a]b', 'Länge', 'or', 'x"y'),
    fc.string({ minLength: 1, maxLength: 8 }),
  )
  .filter((name) => name.trim() === name && name !== '')
  .map((name): FormulaNode => ({ kind: 'column', name, at: 0 }));
const textNode = fc.string({ maxLength: 8 }).map((value): FormulaNode => ({ kind: 'text', value, at: 0 }));

const { number: numbers, truth: truths } = fc.letrec<{ number: FormulaNode; truth: FormulaNode }>((tie) => ({
  number: fc.oneof(
    { maxDepth: 4 },
    numberNode,
    columnNode,
    fc
      .tuple(fc.constantFrom('+', '-', '*', '/', '^'), tie('number'), tie('number'))
      .map(([sign, left, right]): FormulaNode => ({ kind: 'arithmetic', sign, left, right, at: 0 })),
    fc
      .tuple(fc.constantFrom('log', 'min', 'year'), fc.array(tie('number'), { minLength: 1, maxLength: 3 }))
      .map(([name, given]): FormulaNode => ({ kind: 'call', name, given, at: 0 })),
  ),
  truth: fc.oneof(
    { maxDepth: 4 },
    fc
      .tuple(fc.constantFrom('=', '<>', '<', '<=', '>', '>='), tie('number'), fc.oneof(tie('number'), textNode))
      .map(([sign, left, right]): FormulaNode => ({ kind: 'comparison', sign, left, right, at: 0 })),
    tie('number').map((of): FormulaNode => ({ kind: 'missing', of })),
    tie('truth').map((of): FormulaNode => ({ kind: 'not', of, at: 0 })),
    fc
      .tuple(fc.constantFrom('and', 'or'), tie('truth'), tie('truth'))
      .map(([word, left, right]): FormulaNode => ({ kind: 'junction', word, left, right, at: 0 })),
  ),
}));

/** Every part in brackets, so that nothing rests on what binds closer. */
function print(node: FormulaNode): string {
  switch (node.kind) {
    case 'number':
      return String(node.value);
    case 'text':
      return `"${node.value.replaceAll('"', '""')}"`;
    case 'column':
      return `[${node.name.replaceAll(']', ']]')}]`;
    case 'arithmetic':
    case 'comparison':
      return `(${print(node.left)} ${node.sign} ${print(node.right)})`;
    case 'junction':
      return `(${print(node.left)} ${node.word} ${print(node.right)})`;
    case 'not':
      return `(not ${print(node.of)})`;
    case 'missing':
      return `(${print(node.of)} is missing)`;
    case 'call':
      return `${node.name}(${node.given.map(print).join(', ')})`;
  }
}

const withoutPlaces = (node: FormulaNode): unknown =>
  JSON.parse(JSON.stringify(node, (key, value: unknown) => (key === 'at' ? undefined : value)));

const fits = (node: FormulaNode): boolean => print(node).length <= maximumFormulaLength;
const table: RecordTable = { rowCount: 1, columns: [{ name: 'a', kind: 'numeric', values: Float64Array.of(3) }] };

function refusalOf(formula: string): FormulaError | null {
  try {
    parseFormula(formula);
    return null;
  } catch (error) {
    if (error instanceof FormulaError) return error;
    throw error;
  }
}

describe('whatever is given as a formula', () => {
  it('is parsed, or refused with a place inside it', () => {
    const given = fc.oneof(
      fc.string({ unit: 'binary', maxLength: 600 }),
      fc.array(fc.constantFrom(...pieces), { maxLength: 60 }).map((parts) => parts.join('')),
    );
    fc.assert(
      fc.property(given, (formula) => {
        const refusal = refusalOf(formula);
        if (!refusal) return;
        expect(refusal.at).toBeGreaterThanOrEqual(1);
        expect(refusal.at).toBeLessThanOrEqual(formula.length + 1);
      }),
      { numRuns: 2000 },
    );
  });

  it('is the same tree again when it is printed and parsed', () => {
    fc.assert(
      fc.property(fc.oneof(numbers, truths).filter(fits), (tree) => {
        expect(withoutPlaces(parseFormula(print(tree)))).toEqual(withoutPlaces(tree));
      }),
      { numRuns: 500 },
    );
  });

  it.each([
    ['brackets', '('.repeat(100_000)],
    ['calls', 'log('.repeat(100_000)],
    ['minus signs', `${'-'.repeat(100_000)}1`],
    ['powers', `${'2^'.repeat(100_000)}1`],
    ['nots', `${'not '.repeat(100_000)}a > 1`],
  ])('is refused when its %s are nested too deep, before they exhaust the stack', (_what, formula) => {
    expect(refusalOf(formula)?.message).toContain('longer than 500 characters');
  });

  it.each([
    ['minus signs', `${'-'.repeat(499)}1`, -1],
    ['powers', `${'1^'.repeat(249)}a`, 1],
    ['sums', `${'1+'.repeat(249)}a`, 252],
    ['calls', `${'abs('.repeat(99)}a${')'.repeat(99)}`, 3],
  ])('is computed with the deepest %s that fit', (_what, formula, expected) => {
    expect(bindNumber(formula, table)(0)).toBe(expected);
  });
});
