import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { CategoryRecordColumn, NumericRecordColumn, RecordTable } from '../../regression/records';
import { noRows, type Finding } from './finding';
import { pairMoments } from './robust';

/** Columns beyond this are not compared: the work grows with their square. */
const comparedColumns = 200;
const fewestRows = 20;
/** |correlation| from which two columns say the same. */
const alikeCorrelation = 0.9995;
/** R² on the other columns from which a column is a combination of them: variance inflation 10,000. */
const combinedShare = 0.9999;
/** R² of the target on one input from which the input looks like the target in disguise. */
const leakingShare = 0.99;

const varies = (column: NumericRecordColumn): boolean =>
  new Set(column.values.slice(0, 2000).filter((value) => value === value)).size > 1;

function numericColumns(table: RecordTable): NumericRecordColumn[] {
  return table.columns
    .filter((column) => column.kind === 'numeric')
    .filter(varies)
    .slice(0, comparedColumns);
}

function columnsAlike(a: NumericRecordColumn, b: NumericRecordColumn): Finding[] {
  const { count, correlation, sdX, sdY } = pairMoments(a.values, b.values);
  if (count < fewestRows || !(Math.abs(correlation) >= alikeCorrelation)) return [];
  const factor = (Math.sign(correlation) * sdY) / sdX;
  return [
    {
      kind: 'columns-alike',
      columns: [a.name, b.name],
      message: `${b.name} is nearly a copy of ${a.name} (correlation ${correlation.toFixed(5)}, about ${factor.toPrecision(4)} times it, apart from a constant).`,
      remedy: 'Use one of the two as an input; ridge would share one weight between them.',
      ...noRows,
    },
  ];
}

export function findColumnsAlike(table: RecordTable): Finding[] {
  const columns = numericColumns(table);
  return columns.flatMap((a, first) => columns.slice(first + 1).flatMap((b) => columnsAlike(a, b)));
}

/** Of several columns that are alike, the first stands for the others. */
function withoutCopies(columns: readonly NumericRecordColumn[], alike: readonly Finding[]): NumericRecordColumn[] {
  const copies = new Set(alike.map((finding) => finding.columns[1]));
  return columns.filter((column) => !copies.has(column.name));
}

/**
 * With correlations R of the columns over the rows where all are present, and P = R⁻¹: column j's R² on the others
 * is 1 − 1/Pⱼⱼ and its standardised weights on them are −Pⱼₖ/Pⱼⱼ (Lauritzen 1996, Graphical Models, section 5.1).
 * 10⁻⁹ on the diagonal keeps an exact combination invertible.
 */
export function findCombinations(table: RecordTable, alike: readonly Finding[]): Finding[] {
  const filled = numericColumns(table).filter(
    (column) => column.values.filter((value) => value === value).length >= 0.8 * table.rowCount,
  );
  const columns = withoutCopies(filled, alike);
  const complete = Uint8Array.from({ length: table.rowCount }, (_, row) =>
    columns.every((column) => column.values[row] === column.values[row]) ? 1 : 0,
  );
  const rows = complete.reduce((total, use) => total + use, 0);
  if (columns.length < 3 || rows < Math.max(fewestRows, 2 * columns.length)) return [];
  const correlations = Matrix.eye(columns.length, columns.length, 1 + 1e-9);
  columns.forEach((a, row) =>
    columns.slice(0, row).forEach((b, column) => {
      const { correlation } = pairMoments(a.values, b.values, complete);
      correlations.set(row, column, correlation || 0);
      correlations.set(column, row, correlation || 0);
    }),
  );
  const decomposition = new CholeskyDecomposition(correlations);
  if (!decomposition.isPositiveDefinite()) return [];
  return combinationsIn(decomposition.solve(Matrix.eye(columns.length)), columns);
}

/** Each combination once: the columns that take part in it are not reported again from their own side. */
function combinationsIn(precision: Matrix, columns: readonly NumericRecordColumn[]): Finding[] {
  const told = new Set<string>();
  return columns.flatMap((column, at): Finding[] => {
    const inflation = precision.get(at, at);
    const share = 1 - 1 / inflation;
    if (share < combinedShare || told.has(column.name)) return [];
    const others = columns
      .filter((_, other) => other !== at && Math.abs(precision.get(at, other)) / inflation > 0.01)
      .map((other) => other.name);
    for (const name of [column.name, ...others]) told.add(name);
    return [
      {
        kind: 'column-combination',
        columns: [column.name, ...others],
        message: `${column.name} is all but a sum of multiples of ${others.join(', ')} (R² ${share.toFixed(6)}).`,
        remedy: 'Leave one of them out of the inputs, or let ridge share the weight and read the shared load.',
        ...noRows,
      },
    ];
  });
}

const logsOf = (values: Float64Array): Float64Array => values.map((value) => (value > 0 ? Math.log(value) : NaN));

/** The larger of R² as recorded and R² of the logs. */
function shareFromNumbers(input: NumericRecordColumn, target: NumericRecordColumn): number {
  const plain = pairMoments(input.values, target.values);
  const logs = pairMoments(logsOf(input.values), logsOf(target.values));
  const shares = [plain, logs]
    .filter((pair) => pair.count >= Math.max(fewestRows, 0.5 * plain.count))
    .map((pair) => pair.correlation ** 2);
  return Math.max(0, ...shares.filter((share) => share === share));
}

/** R² of the target on the levels' means; levels with few rows fit by chance and are no evidence. */
function shareFromLevels(input: CategoryRecordColumn, target: NumericRecordColumn): number {
  if (input.levels.length > target.values.length / 10) return 0;
  const sums = new Float64Array(input.levels.length);
  const counts = new Float64Array(input.levels.length);
  input.codes.forEach((code, row) => {
    if (code < 0 || target.values[row] !== target.values[row]) return;
    sums[code] += target.values[row];
    counts[code]++;
  });
  const means = Float64Array.from(input.codes, (code) => (code < 0 ? NaN : sums[code] / counts[code]));
  return pairMoments(means, target.values).correlation ** 2;
}

/** Inputs that alone predict the target almost perfectly: most often the target itself, known only afterwards. */
export function findLeakage(table: RecordTable, targetName: string): Finding[] {
  const target = table.columns.find((column) => column.name === targetName);
  if (target?.kind !== 'numeric') return [];
  return table.columns.flatMap((input): Finding[] => {
    if (input === target || (input.kind !== 'numeric' && input.kind !== 'category')) return [];
    const share = input.kind === 'numeric' ? shareFromNumbers(input, target) : shareFromLevels(input, target);
    if (!(share >= leakingShare)) return [];
    return [
      {
        kind: 'leakage-suspect',
        columns: [input.name],
        message: `${input.name} alone predicts ${targetName} almost perfectly (R² ${share.toFixed(4)}).`,
        remedy: `Ask whether ${input.name} is known before the case is done. If not, set it aside.`,
        ...noRows,
      },
    ];
  });
}
