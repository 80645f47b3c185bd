import { columnUnitOf } from './cell-form';
import type { CellCensus } from './cell-census';
import { DateForm } from './date-cell';
import { unitOf } from './header';
import type { LookedColumn } from './looked-column';
import type { DecimalMark } from './number-cell';
import { unitNamed } from './units';

export interface DoubtContext {
  readonly census: CellCensus;
  /** The file's decimal mark, and whether a column or a choice makes it certain. */
  readonly decimal: DecimalMark;
  readonly decimalCertain: boolean;
}

const bothOrders = DateForm.dayFirst | DateForm.monthFirst;
const shown = (text: string): string => `“${text.trim().slice(0, 40)}”`;
const cells = (count: number): string => (count === 1 ? '1 cell' : `${count.toLocaleString('en-GB')} cells`);
const markName = (mark: DecimalMark): string => (mark === '.' ? 'point' : 'comma');

function dateDoubts({ plan, evidence, form }: LookedColumn): string[] {
  if (evidence.isEmpty || plan.dateOrder !== null) return [];
  if (evidence.certainOrders === bothOrders)
    return [
      'Some cells are dates only with the day first, others only with the month first. Choose which order holds.',
    ];
  if (evidence.dateForms !== bothOrders) return [];
  return form.kind === 'date'
    ? ['Every date could be read with the day or the month first; the day is taken to come first. Choose the order.']
    : [
        'Every date could be read with the day or the month first, so they stay words. Choose the kind Date and the order.',
      ];
}

function shortYears({ form }: LookedColumn, { census }: DoubtContext): string[] {
  if (form.kind !== 'date' || census.shortYears === 0) return [];
  return [
    `${cells(census.shortYears)} ${census.shortYears === 1 ? 'writes' : 'write'} the year with two digits: 69 to 99 count as 1969 to 1999, 00 to 68 as 2000 to 2068.`,
  ];
}

function spreadsheetErrors({ census }: DoubtContext): string[] {
  if (census.errors === 0) return [];
  const what = census.errors === 1 ? 'holds a spreadsheet’s error' : 'hold spreadsheet errors';
  return [`${cells(census.errors)} ${what}, such as ${shown(census.error ?? '')}, and count as missing.`];
}

function markDoubts({ evidence, form }: LookedColumn, { census, decimal, decimalCertain }: DoubtContext): string[] {
  if (form.kind !== 'numeric' || !evidence.hasMarks) return [];
  if (form.mark !== decimal)
    return [`Its decimal mark is the ${markName(form.mark)}, unlike that of the other columns.`];
  const open = evidence.allowsMark('.') && evidence.allowsMark(',') && census.doubtfulNumber !== null;
  if (decimalCertain || !open) return [];
  return [
    `${shown(census.doubtfulNumber ?? '')} could have a decimal mark or grouped thousands; the ${markName(form.mark)} is taken for the decimal mark. Choose it if that is wrong.`,
  ];
}

function mixedUnits({ evidence, form }: LookedColumn): string[] {
  if (evidence.units.size === 0) return [];
  const listed = [...evidence.units].map(([unit, count]) => `${unit.symbol} in ${cells(count)}`).join(', ');
  if (form.kind !== 'numeric')
    return evidence.units.size > 1 ? [`The cells have units that cannot be brought to one: ${listed}.`] : [];
  const { unit } = form;
  const [first] = evidence.units.keys();
  if (!unit) return [`The cells have units that cannot be converted to the column’s own: ${listed}.`];
  return evidence.units.size > 1 || first !== unit ? [`Units differ (${listed}); readings become ${unit.symbol}.`] : [];
}

function plainAmongUnits(column: LookedColumn, { census }: DoubtContext): string[] {
  const { form, evidence, plan } = column;
  if (form.kind !== 'numeric' || evidence.units.size === 0 || census.numbers === 0) return [];
  const unit = columnUnitOf(plan, form) ?? form.unit?.symbol;
  return unit
    ? [`${cells(census.numbers)} without a unit ${census.numbers === 1 ? 'counts' : 'count'} as ${unit}.`]
    : [];
}

function headerUnit({ plan, form }: LookedColumn): string[] {
  const named = unitOf(plan.name);
  if (form.kind !== 'numeric' || named === null || plan.unit === null || plan.unit === named) return [];
  const [header, chosen] = [unitNamed(named), unitNamed(plan.unit)];
  if (header !== null && header === chosen) return [];
  return [`The header says ${named}; numbers without a unit count as ${plan.unit} and are not converted.`];
}

function wordDoubts({ plan, form, evidence }: LookedColumn, { census }: DoubtContext): string[] {
  if (form.kind !== 'words' || plan.kind !== null || evidence.dateForms !== 0) return [];
  const numbers = census.numbers + census.withUnit;
  if (census.leadingZeros > 0 && census.words + census.dates === 0)
    return [`${cells(census.leadingZeros)} begin with zeros, so the column is taken as words, such as codes.`];
  const others = census.words + census.dates + census.leadingZeros;
  if (numbers === 0 || others === 0) return [];
  const example = census.word === null ? '' : `, such as ${shown(census.word)}`;
  if (numbers >= others)
    return [
      `${others.toLocaleString('en-GB')} of ${cells(numbers + others)} ${others === 1 ? 'is not a number' : 'are not numbers'}${example}, so the column is taken as words. Name such words as marks for “no reading”, or choose the kind Number.`,
    ];
  return numbers * 10 <= others
    ? [`${cells(numbers)} among words ${numbers === 1 ? 'is a number' : 'are numbers'}.`]
    : [];
}

function misfits({ unreadableCount, kind, plan }: LookedColumn): string[] {
  if (plan.kind === 'category' && kind === 'text')
    return ['It has too many or too long words for the kind Category and would be Text.'];
  if (unreadableCount === 0) return [];
  const what = kind === 'date' ? 'dates' : 'numbers';
  return [`${cells(unreadableCount)} cannot be read as ${what} and would be missing.`];
}

/** What a person should look at before the column counts, in sentences. */
export const doubtsOf = (column: LookedColumn, context: DoubtContext): string[] => [
  ...dateDoubts(column),
  ...shortYears(column, context),
  ...markDoubts(column, context),
  ...mixedUnits(column),
  ...plainAmongUnits(column, context),
  ...headerUnit(column),
  ...wordDoubts(column, context),
  ...misfits(column),
  ...spreadsheetErrors(context),
];
