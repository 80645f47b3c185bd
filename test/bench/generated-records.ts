import { seededRandom } from '../../service/src/regression/random';
import type { RecordTable } from '../../service/src/regression/records';

export interface BenchSize {
  readonly records: number;
  readonly inputs: number;
}

export const FOLDS = 10;

/** Column-major inputs, then the target: what both programs read. */
export type GeneratedData = Float64Array;

/**
 * Neighbouring inputs correlate at 0.5; thirty of them carry the target, with as much noise as signal. Sums of four uniform
 * numbers stand for normal ones.
 */
export function generateData({ records, inputs }: BenchSize): GeneratedData {
  const random = seededRandom(records * 31 + inputs);
  const noise = (): number => (random() + random() + random() + random() - 2) * 1.7320508;
  const data = new Float64Array(records * (inputs + 1));
  const target = data.subarray(records * inputs);
  for (let input = 0; input < inputs; input += 1) {
    const column = data.subarray(input * records, (input + 1) * records);
    const before = input === 0 ? null : data.subarray((input - 1) * records, input * records);
    const carried = input % Math.max(1, Math.floor(inputs / 30)) === 0 ? (input % 2 === 0 ? 1 : -1) : 0;
    for (let record = 0; record < records; record += 1) {
      column[record] = before === null ? noise() : 0.5 * before[record] + 0.8660254 * noise();
      target[record] += carried * column[record];
    }
  }
  for (let record = 0; record < records; record += 1) target[record] += 5 * noise();
  return data;
}

/** The data as records, with a column of fold numbers: ten contiguous blocks, as KFold without shuffling has them. */
export function asRecords(data: GeneratedData, { records, inputs }: BenchSize): RecordTable {
  const columns = Array.from({ length: inputs }, (_, input) => ({
    name: `x${input}`,
    kind: 'numeric' as const,
    values: data.subarray(input * records, (input + 1) * records),
  }));
  const fold = Float64Array.from({ length: records }, (_, record) => Math.floor((record * FOLDS) / records));
  return {
    rowCount: records,
    columns: [
      ...columns,
      { name: 'y', kind: 'numeric', values: data.subarray(records * inputs) },
      { name: 'fold', kind: 'numeric', values: fold },
    ],
  };
}
