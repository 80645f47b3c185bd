import type { RecordColumn, RecordTable } from '../../regression/records';
import { findConstant, findLevelsAlike, findNearlyNumeric, findOutlying, findTimeGaps } from './column-findings';
import type { Finding } from './finding';
import { findColumnsAlike, findCombinations, findLeakage } from './related-columns';
import { findRepeatedRows } from './repeated-rows';
import { findUnitMixUps } from './unit-mix-ups';

function findInColumn(column: RecordColumn): Finding[] {
  const constant = findConstant(column);
  if (constant.length > 0) return constant;
  if (column.kind === 'numeric') return findOutlying(column);
  if (column.kind === 'date') return findTimeGaps(column);
  return [...(column.kind === 'category' ? findLevelsAlike(column) : []), ...findNearlyNumeric(column)];
}

/** Everything in a table that a person should look at before fitting; leakage only once a target is named. Pure; cost: rows × columns². */
export function findProblems(table: RecordTable, targetName?: string): Finding[] {
  const alike = findColumnsAlike(table);
  return [
    ...findUnitMixUps(table),
    ...findRepeatedRows(table),
    ...table.columns.flatMap(findInColumn),
    ...alike,
    ...findCombinations(table, alike),
    ...(targetName === undefined ? [] : findLeakage(table, targetName)),
  ];
}
