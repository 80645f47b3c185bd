import type { components } from '../../../../openapi/types/desk';
import { appendingOutlookOf, type ColumnsOutlook } from './appending-outlook';
import { takeCensus } from './cell-census';
import { columnUnitOf, fileMarkOf, orderOfForms, targetUnitOf } from './cell-form';
import { doubtsOf } from './column-doubts';
import type { ColumnEvidence } from './column-evidence';
import { planColumns } from './column-plan';
import { gatherEvidence, lookAtColumn, shownCell, type LookedColumn } from './looked-column';
import { lookAtRows, shownRows, type LookedRows } from './looked-rows';
import type { DecimalMark } from './number-cell';
import type { BaseColumn, ReadingChoices } from './reading-choices';
import { openRowSource, type RowSource } from './row-source';
import { suspectMarksOf } from './suspect-marks';
import { areConvertible, conversionOf, converted } from './units';

type Schemas = components['schemas'];
type ProposedColumn = Schemas['ProposedColumn'];

/** A proposal as far as the file tells; whoever asks knows the revision that it is appended to. */
export type ProposedReading = Omit<Schemas['ReadingProposal'], 'appending'> & {
  readonly appending: ColumnsOutlook | null;
};

interface FileMark {
  readonly decimal: DecimalMark;
  readonly decimalCertain: boolean;
}

function unitsInCells(evidence: ColumnEvidence): ProposedColumn['unitsInCells'] {
  const target = targetUnitOf(evidence);
  const found = [...evidence.units].map(([unit, count]) => ({
    unit: unit.symbol,
    count,
    factor: target && areConvertible(unit, target) ? converted(1, conversionOf(unit, target)) : null,
  }));
  return found.sort((a, b) => b.count - a.count);
}

function proposedColumn(column: LookedColumn, rows: LookedRows['rows'], mark: FileMark): ProposedColumn {
  const { plan, form, kind, values, unreadableCount } = column;
  const numbers = kind === 'numeric' ? values.filter((value) => typeof value === 'number') : [];
  return {
    name: plan.name,
    position: plan.position,
    kind,
    unit: columnUnitOf(plan, form),
    dateOrder: form.kind === 'date' ? (plan.dateOrder ?? orderOfForms(form.forms)) : null,
    setAside: plan.setAside,
    missingMarks: [...plan.marks.extra],
    missingCount: values.filter((value) => value === null).length - unreadableCount,
    unreadableCount,
    unreadableRows: [...column.unreadableRows],
    unitsInCells: unitsInCells(column.evidence),
    suspectMarks: suspectMarksOf(numbers),
    doubts: doubtsOf(column, { census: takeCensus(plan, rows), ...mark }),
  };
}

function fileMark(evidence: readonly ColumnEvidence[], source: RowSource, choices: ReadingChoices): FileMark {
  const read = evidence.filter(({ plan }) => !plan.setAside);
  const isCertain = read.some((column) => column.allowsMark('.') !== column.allowsMark(','));
  return {
    decimal: choices.decimal ?? fileMarkOf(read, source.format.delimiter),
    decimalCertain: choices.decimal !== undefined || isCertain,
  };
}

function choicesAsTheyStand(source: RowSource, choices: ReadingChoices, decimal: DecimalMark): ReadingChoices {
  const { delimiter, headerLine } = source.format;
  return {
    ...(source.sheet !== null && { sheet: source.sheet }),
    ...(delimiter !== '' && { delimiter }),
    decimal,
    headerLine,
    missingMarks: choices.missingMarks ?? [],
    columns: choices.columns ?? [],
  };
}

/**
 * How a file would be read, from its first rows and from what was chosen already. With `base`, the kinds and units of
 * the revision that it is appended to hold, and columns that only the file has are set aside.
 */
export async function proposeReading(
  path: string,
  choices: ReadingChoices,
  base?: readonly BaseColumn[],
): Promise<ProposedReading> {
  const source = await openRowSource(path, choices);
  const looked = await lookAtRows(source, choices);
  const { names, rows, complete } = looked;
  const evidence = planColumns(names, choices, base).map((plan) => gatherEvidence(plan, rows));
  const mark = fileMark(evidence, source, choices);
  const columns = evidence.map((one) => lookAtColumn(one, rows, mark.decimal));
  const shown = rows.slice(0, shownRows);
  return {
    fileKind: source.sheet === null ? 'text' : 'workbook',
    sheets: [...source.sheets],
    encoding: source.format.encoding,
    choices: choicesAsTheyStand(source, choices, mark.decimal),
    columns: columns.map((column) => proposedColumn(column, rows, mark)),
    rowsLookedAt: rows.length,
    complete,
    written: shown.map((row) => [...row]),
    read: shown.map((_, row) => columns.map((column) => (column.plan.setAside ? null : shownCell(column, row)))),
    appending: base ? appendingOutlookOf(looked, choices, base, mark.decimal) : null,
  };
}
