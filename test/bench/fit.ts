/**
 * Times the whole choice of a penalty (100 penalties × 10 folds, then the final fit) against scikit-learn on generated data, and
 * checks that both come to the same held-out errors, the same penalty and the same weights. Run by `npm run bench:fit`;
 * `-- --size 10000x50` picks one size, `-- --all-penalties` lets scikit-learn run every ridge penalty instead of ten of them.
 */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { availableParallelism, cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fitRecords } from '../../service/src/regression/fit';
import { crossProduct } from '../../service/src/regression/linear-algebra/cross-product';
import type { FitResult } from '../../service/src/regression/result';
import { FoldPool, threadsForFolds } from '../../service/src/fits/fold-pool';
import { asRecords, FOLDS, generateData, type BenchSize, type GeneratedData } from './generated-records';

type BenchMethod = 'ridge' | 'lasso';

interface BenchRow {
  readonly size: string;
  readonly method: BenchMethod;
  readonly seconds: number;
  readonly wholeSeconds: number;
  readonly floorSeconds: number;
  readonly peakMegabytes: number;
  readonly referenceSeconds: number | null;
  readonly agreement: string;
}

const SIZES: readonly BenchSize[] = [
  { records: 10_000, inputs: 50 },
  { records: 100_000, inputs: 50 },
  { records: 100_000, inputs: 200 },
  { records: 2_000, inputs: 2_000 },
  { records: 500, inputs: 5_000 },
];
const METHODS: readonly BenchMethod[] = ['ridge', 'lasso'];
const PYTHON = process.env['PYTHON'] ?? '/usr/bin/python3';
const THREADS = Math.min(availableParallelism(), FOLDS);

interface Timed {
  readonly result: FitResult;
  readonly seconds: number;
  readonly wholeSeconds: number;
}

/** `seconds` ends when penalty and weights are known; `wholeSeconds` also has intervals, diagnostics and the formula. */
async function timeFit(data: GeneratedData, size: BenchSize, method: BenchMethod): Promise<Timed> {
  const records = asRecords(data, size);
  const threads = threadsForFolds({ rowCount: size.records, inputCount: size.inputs, folds: FOLDS });
  const pool = threads === 1 ? null : new FoldPool({ threads });
  const start = performance.now();
  let chosen = start;
  const { result } = await fitRecords(
    records,
    {
      target: { column: 'y', transform: 'none' },
      inputs: Array.from({ length: size.inputs }, (_, input) => ({ column: `x${input}` })),
      method,
      penalty: { rule: 'minimum' },
      validation: { scheme: 'grouped', folds: FOLDS, column: 'fold' },
    },
    {
      ...(pool && { runFolds: pool.run }),
      onProgress: ({ stage, done }) => {
        if (stage === 'diagnostics' && done === 0) chosen = performance.now();
      },
    },
  );
  const end = performance.now();
  await pool?.close();
  return { result, seconds: (chosen - start) / 1000, wholeSeconds: (end - start) / 1000 };
}

function timeFloor(data: GeneratedData, { records, inputs }: BenchSize): number {
  const start = performance.now();
  crossProduct(data, inputs + 1, { rowCount: records, start: 0, end: records });
  return (performance.now() - start) / 1000;
}

interface ReferenceAnswer {
  readonly seconds: number;
  readonly cvError: readonly number[];
  readonly weights: readonly number[];
}

function runReference(
  data: GeneratedData,
  size: BenchSize,
  method: BenchMethod,
  result: FitResult,
): { answer: ReferenceAnswer; run: readonly number[] } {
  const folder = mkdtempSync(join(tmpdir(), 'bench-fit-'));
  try {
    const lambdas = result.path.map((point) => point.lambda);
    const chosen = lambdas.indexOf(result.penalty.lambda);
    const all = lambdas.map((_, at) => at);
    const near = [chosen - 1, chosen, chosen + 1].filter((at) => at >= 0 && at < all.length);
    const some = [...new Set([...all.filter((at) => at % 14 === 0), ...near])].sort((first, second) => first - second);
    const run = method === 'lasso' || process.argv.includes('--all-penalties') ? all : some;
    const files = ['data.bin', 'lambdas.json', 'wanted.json'].map((name) => join(folder, name));
    writeFileSync(files[0], new Uint8Array(data.buffer, data.byteOffset, data.byteLength));
    writeFileSync(files[1], JSON.stringify(lambdas));
    writeFileSync(files[2], JSON.stringify({ run, chosen }));
    const script = join(__dirname, '..', '..', '..', 'test', 'bench', 'reference_fit.py');
    const given = [
      script,
      files[0],
      String(size.records),
      String(size.inputs),
      method,
      files[1],
      files[2],
      String(THREADS),
    ];
    const environment = { ...process.env, OMP_NUM_THREADS: '1', OPENBLAS_NUM_THREADS: '1' };
    const output = execFileSync(PYTHON, given, { encoding: 'utf8', maxBuffer: 1 << 28, env: environment });
    return { answer: JSON.parse(output) as ReferenceAnswer, run };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** Largest relative differences of held-out errors and weights, and whether both prefer the same penalty. */
function compare(result: FitResult, answer: ReferenceAnswer, run: readonly number[]): string {
  const errors = run.map((at) => result.path[at].cvError);
  const errorGap = Math.max(...errors.map((error, at) => Math.abs(error / answer.cvError[at] - 1)));
  const best = run[answer.cvError.indexOf(Math.min(...answer.cvError))];
  const same = result.path[best].lambda === result.penalty.lambda;
  const largest = Math.max(...answer.weights.map(Math.abs));
  const weightGap =
    Math.max(...result.weights.map((weight, at) => Math.abs(weight.standardised - answer.weights[at]))) / largest;
  return `${same ? 'same penalty' : `OTHER PENALTY (${best})`}, errors to ${errorGap.toExponential(0)}, weights to ${weightGap.toExponential(0)}`;
}

function hasReference(): boolean {
  return spawnSync(PYTHON, ['-c', 'import sklearn']).status === 0;
}

async function benchOne(size: BenchSize, method: BenchMethod): Promise<BenchRow> {
  const data = generateData(size);
  const floorSeconds = timeFloor(data, size);
  const timed = await timeFit(data, size, method);
  const peakMegabytes = process.resourceUsage().maxRSS / 1024;
  const reference = hasReference() ? runReference(data, size, method, timed.result) : null;
  return {
    size: `${size.records} × ${size.inputs}`,
    method,
    seconds: timed.seconds,
    wholeSeconds: timed.wholeSeconds,
    floorSeconds,
    peakMegabytes,
    referenceSeconds: reference?.answer.seconds ?? null,
    agreement:
      reference === null ? 'scikit-learn is not installed' : compare(timed.result, reference.answer, reference.run),
  };
}

function printRow(row: BenchRow): void {
  const cells = [
    row.size,
    row.method,
    row.seconds.toFixed(2),
    row.wholeSeconds.toFixed(2),
    row.floorSeconds.toFixed(2),
    row.referenceSeconds === null ? '–' : row.referenceSeconds.toFixed(1),
    row.referenceSeconds === null ? '–' : (row.referenceSeconds / row.seconds).toFixed(1),
    row.peakMegabytes.toFixed(0),
    row.agreement,
  ];
  process.stdout.write(`| ${cells.join(' | ')} |\n`);
}

/** Every size and method runs in a process of its own, so that peak memory is its own. */
async function main(): Promise<void> {
  const one = process.argv.indexOf('--one');
  if (one >= 0) {
    const [records, inputs] = process.argv[one + 1].split('x').map(Number);
    printRow(await benchOne({ records, inputs }, process.argv[one + 2] === 'lasso' ? 'lasso' : 'ridge'));
    return;
  }
  const picked = process.argv.indexOf('--size');
  const sizes =
    picked >= 0 ? SIZES.filter(({ records, inputs }) => `${records}x${inputs}` === process.argv[picked + 1]) : SIZES;
  process.stdout.write(`${cpus()[0].model}, ${THREADS} threads, Node ${process.version}\n\n`);
  process.stdout.write(
    '| records × inputs | method | choice and fit, s | with diagnostics, s | bare cross-product, s | scikit-learn, s | ratio | peak MB | agreement |\n',
  );
  process.stdout.write('|---|---|---|---|---|---|---|---|---|\n');
  for (const { records, inputs } of sizes) {
    for (const method of METHODS) {
      spawnSync(process.execPath, [__filename, '--one', `${records}x${inputs}`, method, ...process.argv.slice(2)], {
        stdio: 'inherit',
      });
    }
  }
}

void main();
