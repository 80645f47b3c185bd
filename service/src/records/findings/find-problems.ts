import type { RecordColumn, RecordTable } from '../../regression/records';
import { findConstant, findLevelsAlike, findNearlyNumeric } from './column-findings';
import type { Finding } from './finding';
import { findLeakage } from './leakage';
import { findOutlying } from './outlying-values';
import { findColumnsAlike, findCombinations } from './related-columns';
import { findRepeatedRows } from './repeated-rows';
import { comparedColumnsOf } from './thinned-columns';
import { findTimeGaps } from './time-gaps';
import { findUnitMixUps, unitMixUps, withoutMixUps, type UnitMixUp } from './unit-mix-ups';

function findInColumn(column: RecordColumn, mixUps: readonly UnitMixUp[]): Finding[] {
  // A reading that lies apart because of its unit is told as that, and needs no second remedy.
  if (column.kind === 'numeric') return findOutlying(withoutMixUps(column, mixUps), column.values);
  if (column.kind === 'date') return findTimeGaps(column);
  return [...(column.kind === 'category' ? findLevelsAlike(column) : []), ...findNearlyNumeric(column)];
}

const rightColumn = (column: RecordColumn, mixUps: readonly UnitMixUp[]): RecordColumn =>
  column.kind === 'numeric' ? withoutMixUps(column, mixUps) : column;

/**
 * Everything in a table that a person should look at before fitting; leakage only once a target is named. Steps that
 * name rows by number come before the one that drops rows, so that they can be applied in the order of the findings.
 * Pure; cost: rows × columns²; memory beside the table: some 40 bytes a row.
 */
export function findProblems(table: RecordTable, targetName?: string): Finding[] {
  const mixUps = unitMixUps(table);
  const canBeSetAside = (column: RecordColumn): boolean => table.columns.length > 1 && column.name !== targetName;
  const inColumns = table.columns.flatMap((column) => {
    const constant = findConstant(column, canBeSetAside(column));
    return constant.length > 0 ? constant : findInColumn(column, mixUps);
  });
  // A few readings in another unit would hide that columns go together.
  const putRight = { ...table, columns: table.columns.map((column) => rightColumn(column, mixUps)) };
  const compared = comparedColumnsOf(putRight);
  const alike = findColumnsAlike(compared, targetName);
  return [
    ...findUnitMixUps(mixUps),
    ...inColumns,
    ...alike,
    ...findCombinations(compared, alike, targetName),
    ...(targetName === undefined ? [] : findLeakage(putRight, targetName)),
    ...findRepeatedRows(table),
  ];
}
