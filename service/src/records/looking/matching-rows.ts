import type { Database } from 'better-sqlite3';
import { bindCondition } from '../mending/formula-evaluation';
import { parseFormula, type FormulaNode } from '../mending/formula-parser';
import { FormulaError } from '../mending/formula-tokens';
import { readRecordTableWith } from '../record-table-reader';
import type { RevisionCells } from './revision-cells';

/** Rows that meet a condition, as positions from 0, rising; or what is wrong with the condition. */
export type Matching =
  | { readonly kind: 'matched'; readonly positions: Uint32Array }
  | { readonly kind: 'formula-problem'; readonly message: string };

function namesIn(node: FormulaNode): string[] {
  switch (node.kind) {
    case 'column':
      return [node.name];
    case 'arithmetic':
    case 'comparison':
    case 'junction':
      return [...namesIn(node.left), ...namesIn(node.right)];
    case 'not':
    case 'missing':
      return namesIn(node.of);
    case 'call':
      return node.given.flatMap(namesIn);
    case 'number':
    case 'text':
      return [];
  }
}

/** Names of the columns that a formula speaks of, each once. */
const columnsOfFormula = (formula: string): string[] => [...new Set(namesIn(parseFormula(formula)))];

/** Only the columns that the formula names are read. Cost: one pass over them. */
export function matchingRows(
  connection: Database,
  revisionId: string,
  { columns }: Pick<RevisionCells, 'columns'>,
  where: string,
): Matching {
  try {
    const known = new Set(columns.map(({ name }) => name));
    // A name that no column has is left to the binding, which says at which character it stands.
    const named = columnsOfFormula(where).filter((name) => known.has(name));
    const table = readRecordTableWith(connection, revisionId, named);
    const holds = bindCondition(where, table);
    const positions = new Uint32Array(table.rowCount);
    let count = 0;
    for (let row = 0; row < table.rowCount; row++) if (holds(row)) positions[count++] = row;
    return { kind: 'matched', positions: positions.slice(0, count) };
  } catch (error) {
    if (error instanceof FormulaError) return { kind: 'formula-problem', message: error.message };
    throw error;
  }
}
