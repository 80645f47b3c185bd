import { fitRecords } from '../../service/src/regression/fit';
import { runFoldTask, type FoldTask } from '../../service/src/regression/selection/fold-task';
import { problemOfRows, type StandardisedRows } from '../../service/src/regression/design/standardised-rows';
import { seededRandom } from '../../service/src/regression/random';
import type { ColumnPenalties } from '../../service/src/regression/solvers/column-penalties';
import { descendWide } from '../../service/src/regression/solvers/descent-wide';
import { ridgeFromDual } from '../../service/src/regression/solvers/ridge-dual';
import type { RidgeForm } from '../../service/src/regression/solvers/ridge-form';
import { ridgeFromMoments } from '../../service/src/regression/solvers/ridge-moments';
import { ridgeFromRows } from '../../service/src/regression/solvers/ridge-orthogonal';
import { solvePath } from '../../service/src/regression/solvers/solve-path';
import { inventedRefits, normalNumbers } from './invented-yard';
import { numeric, relativeDifference, table } from './reference';

/** Random columns, standardised by their own records. */
function randomRows(rowCount: number, size: number, seed: number): StandardisedRows {
  const normal = normalNumbers(seededRandom(seed));
  const x = new Float64Array(rowCount * size);
  for (let column = 0; column < size; column += 1) {
    const values = Array.from({ length: rowCount }, normal);
    const mean = values.reduce((sum, value) => sum + value, 0) / rowCount;
    const scale = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / rowCount);
    values.forEach((value, row) => (x[column * rowCount + row] = (value - mean) / scale));
  }
  const y = Float64Array.from({ length: rowCount }, (_, row) => x[row] * 2 - x[rowCount + row] + normal());
  const mean = y.reduce((sum, value) => sum + value, 0) / rowCount;
  const centred = y.map((value) => value - mean);
  return {
    rowCount,
    x,
    y: centred,
    rootWeights: new Float64Array(rowCount).fill(1),
    problem: {
      weightSum: rowCount,
      size,
      kept: Int32Array.from({ length: size }, (_, at) => at),
      targetSquare: centred.reduce((sum, value) => sum + value * value, 0) / rowCount,
      means: new Float64Array(size),
      scales: new Float64Array(size).fill(1),
      targetMean: 0,
      fills: [],
    },
  };
}

/** One free column, one held twice as hard. */
function penalties(size: number): ColumnPenalties {
  const factors = new Float64Array(size).fill(1);
  factors[1] = 0;
  factors[2] = 2;
  return { factors, signs: Array.from({ length: size }, () => 'any' as const) };
}

const LAMBDAS = [10, 1, 0.1, 0.01];

describe.each([
  ['tall', 60, 8],
  ['wide', 14, 40],
])('the routes of ridge on a %s design agree', (_, rowCount, size) => {
  const rows = randomRows(rowCount, size, 5);
  const forms: Readonly<Record<string, RidgeForm>> = {
    moments: ridgeFromMoments(problemOfRows(rows), penalties(size)),
    dual: ridgeFromDual(rows, penalties(size)),
  };
  const orthogonal = ridgeFromRows(rows, penalties(size));

  it.each(Object.keys(forms))('%s with QR and SVD: weights, residual and length', (name) => {
    const expected = orthogonal.weights(LAMBDAS);
    forms[name].weights(LAMBDAS).forEach((weights, at) => expect(relativeDifference(Array.from(weights), Array.from(expected[at]))).toBeLessThan(1e-11));
    for (const lambda of LAMBDAS) {
      expect(forms[name].parts(lambda).residualSquare).toBeCloseTo(orthogonal.parts(lambda).residualSquare, 11);
      expect(forms[name].parts(lambda).penaltySquare).toBeCloseTo(orthogonal.parts(lambda).penaltySquare, 10);
    }
  });
});

describe.each([
  ['tall', 60, 8],
  ['wide', 14, 40],
])('the two forms of coordinate descent on a %s design agree', (_, rowCount, size) => {
  it.each([1, 0.5])('at mixing %d: weights and gap', (mixing) => {
    const rows = randomRows(rowCount, size, 9);
    const settings = { kind: 'descent', mixing, polish: true } as const;
    const columns = Array.from(penalties(size).factors, (penaltyFactor, input) => ({ input, penaltyFactor, sign: 'any' as const }));
    const lambdas = [1, 0.5, 0.2, 0.1, 0.05];
    const whole = solvePath({ problem: problemOfRows(rows), rows: null }, columns, settings, lambdas);
    const wide = descendWide(rows, penalties(size), settings, lambdas);
    whole.weights.forEach((weights, at) => expect(relativeDifference(Array.from(wide.weights[at]), Array.from(weights))).toBeLessThan(1e-9));
    expect(Math.max(...wide.gaps)).toBeLessThan(1e-10);
    expect(wide.degreesOfFreedom).toEqual(whole.degreesOfFreedom.map((value) => expect.closeTo(value, 8)));
  });
});

describe('a fit', () => {
  const records = inventedRefits(4000, 21);
  const specification = {
    target: { column: 'labour', transform: 'log' as const },
    inputs: ['length', 'waterline', 'hull', 'yard', 'booked'].map((column) => ({ column })),
    method: 'ridge' as const,
    penalty: { rule: 'minimum' as const },
  };

  it('has the same bits however its tasks are run', async () => {
    const backwards = async (tasks: readonly FoldTask[]) => tasks.map((task, at) => ({ task: structuredClone(task), at })).reverse().map(({ task, at }) => ({ answer: runFoldTask(task), at })).sort((first, second) => first.at - second.at).map(({ answer }) => answer);
    expect(await fitRecords(records, specification, { runFolds: backwards })).toEqual(await fitRecords(records, specification));
  });

  it('agrees between moments and the orthogonal route', async () => {
    const normal = normalNumbers(seededRandom(2));
    const columns = Array.from({ length: 40 }, (_, at) => numeric(`x${at}`, Array.from({ length: 16000 }, () => normal() + 100)));
    const target = numeric('y', Array.from({ length: 16000 }, (_, row) => columns.slice(0, 5).reduce((sum, column) => sum + (column.kind === 'numeric' ? column.values[row] : 0), normal())));
    const wanted = { target: { column: 'y', transform: 'none' as const }, inputs: columns.map((column) => ({ column: column.name })), method: 'ridge' as const, penalty: { rule: 'fixed' as const, value: 0.01 } };
    const moments = await fitRecords(table([...columns, target]), wanted);
    expect(moments.result.report.route).toBe('tridiagonal form of the moments');
    const few = await fitRecords(table([...columns, target]), { ...wanted, rowFilter: { column: 'x0', from: -Infinity } });
    expect(few.result.weights).toEqual(moments.result.weights);
    const leastSquares = await fitRecords(table([...columns, target]), { ...wanted, method: 'least-squares' as const, validation: { scheme: 'k-fold' as const, folds: 2 } });
    // λ = 0.01 on nearly uncorrelated columns shrinks by 1/1.01.
    moments.result.weights.forEach((weight, at) => expect(weight.value).toBeCloseTo(leastSquares.result.weights[at].value / 1.01, 2));
  });
});
