import type { components } from '../../../../openapi/types/desk';
import { columnUnitOf, formOf } from './cell-form';
import { planColumns } from './column-plan';
import { gatherEvidence } from './looked-column';
import type { LookedRows } from './looked-rows';
import type { DecimalMark } from './number-cell';
import type { BaseColumn, ReadingChoices } from './reading-choices';
import { unitNamed } from './units';

/** How the file's columns stand to those of the revision that it is to be appended to. */
export type ColumnsOutlook = Omit<components['schemas']['AppendingOutlook'], 'revision'>;

const sameUnit = (one: string | null, other: string | null): boolean =>
  one === other || (one !== null && other !== null && unitNamed(one) !== null && unitNamed(one) === unitNamed(other));

const isWords = (kind: string): boolean => kind === 'category' || kind === 'text' || kind === 'words';

/** Columns whose kind or unit would come out otherwise if the revision's did not hold. */
function differingColumns(looked: LookedRows, choices: ReadingChoices, base: readonly BaseColumn[], mark: DecimalMark) {
  const held = new Map(base.map((column) => [column.name, column]));
  const marksOnly = choices.columns?.map(({ name, dateOrder, missingMarks }) => ({ name, dateOrder, missingMarks }));
  const alone = planColumns(looked.names, { ...choices, columns: marksOnly });
  return alone.flatMap((plan) => {
    const column = held.get(plan.name);
    const form = column && formOf(gatherEvidence(plan, looked.rows), mark);
    if (!column || !form || form.kind === 'nothing') return [];
    const unit = columnUnitOf(plan, form);
    const sameKind = form.kind === column.kind || (isWords(form.kind) && isWords(column.kind));
    return sameKind && (unit === null || sameUnit(unit, column.unit)) ? [] : [plan.name];
  });
}

export function appendingOutlookOf(
  looked: LookedRows,
  choices: ReadingChoices,
  base: readonly BaseColumn[],
  mark: DecimalMark,
): ColumnsOutlook {
  const has = new Set(looked.names);
  const known = new Set(base.map((column) => column.name));
  return {
    lacking: base.map((column) => column.name).filter((name) => !has.has(name)),
    additional: looked.names.filter((name) => !known.has(name)),
    differing: differingColumns(looked, choices, base, mark),
  };
}
