import { fitRecords } from '../../service/src/regression/fit';
import { resolveSpecification } from '../../service/src/regression/design/resolve-specification';
import { prepareContext, spanOf } from '../../service/src/regression/fit-context';
import { momentsOf, runFoldTask, trainingPart, type FoldTask } from '../../service/src/regression/selection/fold-task';
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
    forms[name]
      .weights(LAMBDAS)
      .forEach((weights, at) =>
        expect(relativeDifference(Array.from(weights), Array.from(expected[at]))).toBeLessThan(1e-11),
      );
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
    const columns = Array.from(penalties(size).factors, (penaltyFactor, input) => ({
      input,
      penaltyFactor,
      sign: 'any' as const,
    }));
    const lambdas = [1, 0.5, 0.2, 0.1, 0.05];
    const whole = solvePath({ problem: problemOfRows(rows), rows: null }, columns, settings, lambdas);
    const wide = descendWide(rows, penalties(size), settings, lambdas);
    whole.weights.forEach((weights, at) =>
      expect(relativeDifference(Array.from(wide.weights[at]), Array.from(weights))).toBeLessThan(1e-9),
    );
    expect(Math.max(...wide.gaps)).toBeLessThan(1e-10);
    expect(wide.degreesOfFreedom).toEqual(whole.degreesOfFreedom.map((value) => expect.closeTo(value, 8)));
  });
});

describe('a fit', () => {
  const records = inventedRefits(1500, 21);
  const specification = {
    target: { column: 'labour', transform: 'log' as const },
    inputs: ['length', 'waterline', 'hull', 'yard', 'booked'].map((column) => ({ column })),
    method: 'ridge' as const,
    penalty: { rule: 'minimum' as const },
  };

  it('has the same bits however its tasks are run', async () => {
    const backwards = async (tasks: readonly FoldTask[]) =>
      tasks
        .map((task, at) => ({ task: structuredClone(task), at }))
        .reverse()
        .map(({ task, at }) => ({ answer: runFoldTask(task), at }))
        .sort((first, second) => first.at - second.at)
        .map(({ answer }) => answer);
    expect(await fitRecords(records, specification, { runFolds: backwards })).toEqual(
      await fitRecords(records, specification),
    );
  });

  it('standardises a fold by moments as it does by rows, categories and filled gaps included', () => {
    const resolved = resolveSpecification({
      ...specification,
      inputs: [...specification.inputs, { column: 'draught', missing: 'typical' }],
    });
    const { design, plan } = prepareContext(records, resolved, {});
    const spans = plan.folds[3].training.map((segment) => spanOf(plan, segment));
    const byMoments = trainingPart(
      design,
      'moments',
      spans,
      spans.map((span) => momentsOf(design, span)),
    ).problem;
    const byRows = trainingPart(design, 'orthogonal', spans, []).problem;
    expect(byMoments.kept).toEqual(byRows.kept);
    expect(byMoments.fills.map((fill) => fill.shift)).toEqual(
      byRows.fills.map((fill) => expect.closeTo(fill.shift, 12)),
    );
    for (const name of ['gram', 'cross', 'means', 'scales'] as const) {
      expect(relativeDifference(Array.from(byMoments[name]), Array.from(byRows[name]))).toBeLessThan(1e-12);
    }
  });

  it('takes the route by moments on a tall table, and says so', async () => {
    const normal = normalNumbers(seededRandom(8));
    const columns = Array.from({ length: 80 }, (_, at) => numeric(`x${at}`, Array.from({ length: 3300 }, normal)));
    const target = numeric('y', Array.from({ length: 3300 }, normal));
    const wanted = {
      target: { column: 'y', transform: 'none' as const },
      inputs: columns.map((column) => ({ column: column.name })),
      validation: { scheme: 'k-fold' as const, folds: 2 },
    };
    const { result } = await fitRecords(table([...columns, target]), {
      ...wanted,
      method: 'ridge',
      penalty: { rule: 'fixed', value: 0.01 },
    });
    expect(result.report.route).toBe('tridiagonal form of the moments');
  });

  it('leaves moments for the records themselves where moments would lose digits', async () => {
    const normal = normalNumbers(seededRandom(2));
    const size = 10000;
    const base = Array.from({ length: 44 }, (_, at) => numeric(`x${at}`, Array.from({ length: size }, normal)));
    const near = numeric(
      'near',
      Array.from(
        { length: size },
        (_, row) => (base[0].kind === 'numeric' ? base[0].values[row] : 0) + 1e-6 * normal(),
      ),
    );
    const target = numeric('y', Array.from({ length: size }, normal));
    const { result } = await fitRecords(table([...base, near, target]), {
      target: { column: 'y', transform: 'none' },
      inputs: [...base, near].map((column) => ({ column: column.name })),
      method: 'least-squares',
      validation: { scheme: 'k-fold', folds: 2 },
    });
    expect(result.report.route).toBe('QR of the records with refinement');
    expect(result.report.conditionNumber).toBeGreaterThan(1e5);
  });
});

describe('progress', () => {
  it('names every fold as it is done, and ends with the diagnostics', async () => {
    const seen: string[] = [];
    await fitRecords(
      inventedRefits(120, 4),
      {
        target: { column: 'labour', transform: 'none' },
        inputs: [{ column: 'length' }],
        method: 'ridge',
        validation: { scheme: 'k-fold', folds: 3 },
      },
      { onProgress: ({ stage, done, total }) => seen.push(`${stage} ${done}/${total}`) },
    );
    expect(seen.filter((line) => line.startsWith('validation'))).toEqual(
      [0, 1, 2, 3].map((done) => `validation ${done}/3`),
    );
    expect(seen[seen.length - 1]).toBe('diagnostics 1/1');
  });
});
