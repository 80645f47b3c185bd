import type { MendStep } from '../../mending/step-change';
import type { ComparedTable } from './compared-table';

/** What columns were called before and are called after the steps: only those that were renamed. */
export function renamesIn(steps: readonly MendStep[]): ReadonlyMap<string, string> {
  const firstName = new Map<string, string>();
  for (const step of steps) {
    if (step.kind === 'derive') firstName.delete(step.name);
    if (step.kind !== 'rename') continue;
    const first = firstName.get(step.column) ?? step.column;
    firstName.delete(step.column);
    // Names are trimmed when a step is applied.
    firstName.set(step.to.trim(), first);
  }
  return new Map([...firstName].filter(([now, first]) => now !== first).map(([now, first]) => [first, now]));
}

/** The same table with its columns under other names; a name that is another's already stays as it is. */
export function renamedTable(table: ComparedTable, names: ReadonlyMap<string, string>): ComparedTable {
  const given = (name: string): string => names.get(name) ?? name;
  const former = new Map(table.columns.map(({ name }) => [given(name), name]));
  if (former.size < table.columns.length) return table;
  return {
    rowCount: table.rowCount,
    columns: table.columns.map((column) => ({ ...column, name: given(column.name) })),
    read: (name) => ({ ...table.read(former.get(name) ?? name), name }),
  };
}
