import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { NumericRecordColumn } from '../../regression/records';
import { noRows, type Finding } from './finding';
import { pairMoments } from './robust';
import type { ComparedColumns } from './thinned-columns';

const fewestRows = 20;
/** |correlation| from which two columns say the same. */
const alikeCorrelation = 0.9995;
/** R² on the other columns from which a column is a combination of them: variance inflation 10,000. */
const combinedShare = 0.9999;
/** Combinations that are told. */
const toldCombinations = 20;

/**
 * Columns that are nearly a copy of one before them; of several that are alike, the first stands for the others, or
 * the target where it is among them. Cost: rows × columns² / 2.
 */
export function findColumnsAlike({ columns, caution }: ComparedColumns, target: string | undefined): Finding[] {
  const kept: NumericRecordColumn[] = [];
  const targetFirst = columns.toSorted((a, b) => Number(b.name === target) - Number(a.name === target));
  return targetFirst.flatMap((column) => {
    const found = kept.flatMap((earlier) => columnsAlike(earlier, column, caution)).slice(0, 1);
    if (found.length === 0) kept.push(column);
    return found;
  });
}

function columnsAlike(a: NumericRecordColumn, b: NumericRecordColumn, caution: string): Finding[] {
  const { count, correlation, sdX, sdY } = pairMoments(a.values, b.values);
  if (count < fewestRows || !(Math.abs(correlation) >= alikeCorrelation)) return [];
  const factor = (Math.sign(correlation) * sdY) / sdX;
  return [
    {
      kind: 'columns-alike',
      columns: [a.name, b.name],
      message: `${b.name} is nearly a copy of ${a.name} (correlation ${correlation.toFixed(5)}, about ${factor.toPrecision(4)} times it, apart from a constant).${caution}`,
      remedy: 'Use one of the two as an input, and set the other aside; ridge would share one weight between them.',
      ...noRows,
      steps: [{ kind: 'set-aside', column: b.name }],
    },
  ];
}

const presentCount = ({ values }: NumericRecordColumn): number =>
  values.reduce((count, value) => (value === value ? count + 1 : count), 0);

/**
 * Columns that are all but a sum of multiples of others, each told once: the last of those that take part is named
 * and left out, and the search goes on without it. Cost: rows × columns² / 2, then columns³ for each.
 */
export function findCombinations(
  { columns: all, caution }: ComparedColumns,
  alike: readonly Finding[],
  target: string | undefined,
): Finding[] {
  const copies = new Set(alike.map((finding) => finding.columns[1]));
  const rowCount = all[0]?.values.length ?? 0;
  const columns = all.filter((column) => !copies.has(column.name) && presentCount(column) >= 0.8 * rowCount);
  const correlations = correlationsOf(columns, rowCount);
  const findings: Finding[] = [];
  let left = correlations ? [...columns.keys()] : [];
  while (correlations && left.length >= 3 && findings.length < toldCombinations) {
    const found = lastCombination(correlations, left, (at) => columns[at].name !== target);
    if (!found) break;
    const [name, ...others] = [found.named, ...found.others].map((at) => columns[at].name);
    findings.push(toFinding(name, others, found.share, caution));
    left = left.filter((at) => at !== found.named);
  }
  return findings;
}

/** Over the rows where all columns are present; null where those are too few. */
function correlationsOf(columns: readonly NumericRecordColumn[], rowCount: number): Matrix | null {
  const complete = Uint8Array.from({ length: rowCount }, (_, row) =>
    columns.every(({ values }) => values[row] === values[row]) ? 1 : 0,
  );
  const rows = complete.reduce((total, use) => total + use, 0);
  if (columns.length < 3 || rows < Math.max(fewestRows, 2 * columns.length)) return null;
  const correlations = Matrix.eye(columns.length, columns.length);
  columns.forEach((a, row) =>
    columns.slice(0, row).forEach((b, column) => {
      const { correlation } = pairMoments(a.values, b.values, complete);
      correlations.set(row, column, correlation || 0);
      correlations.set(column, row, correlation || 0);
    }),
  );
  return correlations;
}

interface Combination {
  readonly named: number;
  readonly others: readonly number[];
  readonly share: number;
}

/**
 * With correlations R of the columns, and P = R⁻¹: column j's R² on the others is 1 − 1/Pⱼⱼ and its standardised
 * weights on them are −Pⱼₖ/Pⱼⱼ (Lauritzen 1996, Graphical Models, section 5.1). 10⁻⁹ on the diagonal keeps an exact
 * combination invertible. Of columns that are a combination, the last that may be named.
 */
function lastCombination(
  correlations: Matrix,
  left: readonly number[],
  mayBeNamed: (at: number) => boolean,
): Combination | null {
  const part = correlations.selection([...left], [...left]).add(Matrix.eye(left.length).mul(1e-9));
  const decomposition = new CholeskyDecomposition(part);
  if (!decomposition.isPositiveDefinite()) return null;
  const precision = decomposition.solve(Matrix.eye(left.length));
  const share = (at: number): number => 1 - 1 / precision.get(at, at);
  const named = left.findLastIndex((column, at) => share(at) >= combinedShare && mayBeNamed(column));
  if (named < 0) return null;
  const takesPart = (at: number): boolean =>
    at !== named && Math.abs(precision.get(named, at)) / precision.get(named, named) > 0.01;
  return { named: left[named], others: left.filter((_, at) => takesPart(at)), share: share(named) };
}

function toFinding(name: string, others: readonly string[], share: number, caution: string): Finding {
  return {
    kind: 'column-combination',
    columns: [name, ...others],
    message: `${name} is all but a sum of multiples of ${others.join(', ')} (R² ${share.toFixed(6)}).${caution}`,
    remedy: `Leave one of them out of the inputs, such as ${name}, or let ridge share the weight and read the shared load.`,
    ...noRows,
    steps: [{ kind: 'set-aside', column: name }],
  };
}
