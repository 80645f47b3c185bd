import type { PointedError } from '../errors';
import { RegressionError } from '../regression/errors';
import { resolveSpecification } from '../regression/design/resolve-specification';
import { toEngineSpecification, type Specification, type SpecificationInput } from './engine-specification';

export interface ColumnFacts {
  readonly name: string;
  readonly kind: 'numeric' | 'category' | 'date' | 'text';
  readonly missingCount: number;
  /** Null for words, and where every reading is missing. */
  readonly minimum: number | null;
}

export interface RecordFacts {
  readonly rowCount: number;
  readonly columns: readonly ColumnFacts[];
}

type Report = (pointer: string, detail: string) => void;

/**
 * Everything about a specification that can be known from the columns alone, with a pointer for each: nothing is queued
 * that is sure to fail. What depends on single records is told by the fit itself.
 */
export function checkSpecification(specification: Specification, records: RecordFacts): readonly PointedError[] {
  const errors: PointedError[] = [];
  const report: Report = (pointer, detail) => errors.push({ pointer: `#/specification${pointer}`, detail });
  const columns = new Map(records.columns.map((column) => [column.name, column]));
  checkTarget(specification, columns, report);
  specification.inputs.forEach((input, at) =>
    checkInput({ specification, input, at, columns }, (field, detail) => report(`/inputs/${at}${field}`, detail)),
  );
  checkWeight(specification, columns, report);
  checkRowFilter(specification, columns, report);
  checkValidation(specification, columns, report);
  if (records.rowCount < 2) report('', 'A fit needs at least 2 records.');
  if (errors.length === 0) checkRules(specification, report);
  return errors;
}

type Columns = ReadonlyMap<string, ColumnFacts>;

function unknown(name: string): string {
  return `The records have no column ${name}.`;
}

/** True when no record is left out of the fit, so that the column's own figures speak for the fit. */
function everyRecordCounts(specification: Specification, columns: Columns): boolean {
  return (
    !specification.weightColumn &&
    !specification.rowFilter &&
    columns.get(specification.target.column)?.missingCount === 0
  );
}

function checkTarget(specification: Specification, columns: Columns, report: Report): void {
  const { column: name, transform } = specification.target;
  const column = columns.get(name);
  if (!column) return report('/target/column', unknown(name));
  if (column.kind !== 'numeric')
    return report('/target/column', `${name} is a ${column.kind} column; the target must be numeric.`);
  if (column.minimum === null) return report('/target/column', `${name} has no reading in any record.`);
  if (transform === 'log' && !specification.weightColumn && !specification.rowFilter && column.minimum <= 0) {
    report('/target/transform', `The logarithm needs values above 0; the least ${name} is ${column.minimum}.`);
  }
}

interface InputPlace {
  readonly specification: Specification;
  readonly input: SpecificationInput;
  readonly at: number;
  readonly columns: Columns;
}

function checkInput(place: InputPlace, report: Report): void {
  const { specification, input, at, columns } = place;
  const column = columns.get(input.column);
  if (!column) return report('/column', unknown(input.column));
  if (input.column === specification.target.column) return report('/column', `${input.column} is the target.`);
  if (specification.inputs.findIndex((other) => other.column === input.column) < at)
    return report('/column', `${input.column} is an input already.`);
  if (column.kind === 'text' || (input.kind === 'numeric' && column.kind === 'category')) {
    return report(
      input.kind ? '/kind' : '/column',
      `${input.column} is a ${column.kind} column; it cannot be read as ${input.kind ?? 'an input'}.`,
    );
  }
  if ((input.kind ?? column.kind) === 'category') checkCategory(input, column, report);
  else checkNumber(place, column, report);
  if (input.missing !== 'typical' && column.missingCount > 0 && everyRecordCounts(specification, columns)) {
    report(
      '/missing',
      `${input.column} is missing in ${column.missingCount} record(s). Choose the rule "typical", or upload records without gaps.`,
    );
  }
}

function checkCategory(input: SpecificationInput, column: ColumnFacts, report: Report): void {
  if (column.kind === 'date') report('/kind', `${input.column} is a date column; it cannot be read as a category.`);
  if (input.transform !== undefined && input.transform !== 'none')
    report('/transform', `${input.column} is a category: it takes no transform.`);
  if (input.sign !== undefined && input.sign !== 'any')
    report('/sign', `${input.column} is a category: its weights take no limit on the sign.`);
}

function checkNumber({ specification, input, columns }: InputPlace, column: ColumnFacts, report: Report): void {
  if (column.minimum === null) return report('/column', `${input.column} has no reading in any record.`);
  if (input.transform === 'spline' && input.sign !== undefined && input.sign !== 'any')
    report('/sign', `A limit on the sign has no meaning for ${input.column}, which is a spline.`);
  if (!everyRecordCounts(specification, columns)) return;
  const impossible =
    (input.transform === 'log' && column.minimum <= 0) || (input.transform === 'square-root' && column.minimum < 0);
  if (impossible)
    report('/transform', `The least ${input.column} is ${column.minimum}: no ${input.transform} of it exists.`);
}

function checkWeight({ weightColumn, target }: Specification, columns: Columns, report: Report): void {
  if (!weightColumn) return;
  const column = columns.get(weightColumn);
  if (!column) report('/weightColumn', unknown(weightColumn));
  else if (weightColumn === target.column) report('/weightColumn', `${weightColumn} is the target.`);
  else if (column.kind !== 'numeric')
    report('/weightColumn', `${weightColumn} is a ${column.kind} column; weights must be numeric.`);
  else if (column.minimum === null || column.minimum < 0)
    report('/weightColumn', `Weights must be 0 or more; the least ${weightColumn} is ${column.minimum ?? 'missing'}.`);
}

function checkRowFilter({ rowFilter }: Specification, columns: Columns, report: Report): void {
  if (!rowFilter) return;
  const { column: name, from, to } = rowFilter;
  const column = columns.get(name);
  if (!column) return report('/rowFilter/column', unknown(name));
  const isOrdered = column.kind === 'numeric' || column.kind === 'date';
  if (!isOrdered && (from !== undefined || to !== undefined))
    report('/rowFilter', `${name} holds words: filter it by values, not by a range.`);
  if (from !== undefined && to !== undefined && from > to)
    report('/rowFilter', `No reading lies from ${from} to ${to}.`);
}

function checkValidation({ validation, target }: Specification, columns: Columns, report: Report): void {
  if (!validation || validation.scheme === undefined || validation.scheme === 'k-fold') return;
  const name = validation.column;
  if (!name) return report('/validation/column', `Validation by ${validation.scheme} folds needs its column.`);
  const column = columns.get(name);
  if (!column) return report('/validation/column', unknown(name));
  if (name === target.column) return report('/validation/column', `${name} is the target.`);
  const timed = column.kind === 'numeric' || column.kind === 'date';
  if (validation.scheme === 'forward' && !timed)
    report('/validation/column', `${name} is a ${column.kind} column; time must be a date or a number.`);
}

/** The engine's own rules between fields: penalty rule and method, values, mixing. */
function checkRules(specification: Specification, report: Report): void {
  try {
    resolveSpecification(toEngineSpecification(specification));
  } catch (error) {
    if (!(error instanceof RegressionError)) throw error;
    const at = specification.inputs.findIndex((input) => input.column === error.column);
    report(at >= 0 ? `/inputs/${at}` : placeOfRule(error.message), error.message);
  }
}

function placeOfRule(message: string): string {
  if (/penalty|prior|rule/i.test(message)) return '/penalty';
  if (/mixing/i.test(message)) return '/mixing';
  return /fold|gap/i.test(message) ? '/validation' : '';
}
