import type { CategoryRecordColumn, NumericRecordColumn, RecordTable } from '../../regression/records';
import { noRows, type Finding } from './finding';
import { pairMoments } from './robust';

const fewestRows = 20;
/** R² of the target on one input from which the input looks like the target in disguise. */
const leakingShare = 0.99;

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
  const means = new Float64Array(input.codes.length);
  input.codes.forEach((code, row) => (means[row] = code < 0 ? NaN : sums[code] / counts[code]));
  const { count, correlation } = pairMoments(means, target.values);
  return count < fewestRows ? 0 : correlation ** 2;
}

/** Inputs that alone predict the target almost perfectly: most often the target itself, known only afterwards. Cost: rows × columns. */
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
        steps: [{ kind: 'set-aside', column: input.name }],
      },
    ];
  });
}
