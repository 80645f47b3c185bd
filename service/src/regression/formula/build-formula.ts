import type { ColumnModel } from '../design/moments';
import type { InputReadings } from '../design/read-input';
import { quantile } from '../design/spline';
import type { FitContext } from '../fit-context';
import { residualsOfFold, type HeldOut } from '../inference/held-out';
import { thinResiduals } from './cv-plus-interval';
import { rangeOf, sortedSample } from './recorded-readings';
import type { FoldModel, Formula, FormulaInput, FormulaInterval, FormulaLeverage, FormulaLevel } from './formula';

/** All residual steps of a formula together; keeps it well under half a megabyte. */
const MOST_RESIDUAL_STEPS = 3000;

export interface FormulaParts {
  readonly model: ColumnModel;
  readonly smearing: number;
  readonly heldOut: HeldOut | null;
  readonly gaussian: FormulaInterval['gaussian'];
  readonly leverage: FormulaLeverage | null;
}

/** Freezes a finished fit. Columns of the model are the design's own, centred on all records. */
export function buildFormula(context: FitContext, parts: FormulaParts): Formula {
  const { specification, read, design } = context;
  const typicalAdditive = design.targetCentre + parts.model.constant;
  const logged = specification.target.transform === 'log';
  return {
    format: 'tarebeam-formula/1',
    target: {
      name: specification.target.column,
      unit: read.targetUnit,
      transform: specification.target.transform,
      smearing: parts.smearing,
      shown: 'mean',
      recordedRange: rangeOf(read.targetRecorded),
    },
    typicalAdditive,
    typical: logged ? Math.exp(typicalAdditive) * parts.smearing : typicalAdditive,
    inputs: read.inputs.map((readings, input) => describeInput(context, readings, input, parts.model)),
    interval: {
      level: specification.intervalLevel,
      rule: parts.heldOut === null ? 'gaussian' : 'cv-plus',
      folds: parts.heldOut === null ? [] : foldModels(parts.heldOut),
      gaussian: parts.gaussian,
    },
    leverage: parts.leverage,
    records: { count: read.count, weightSum: read.weightSum },
  };
}

function foldModels(heldOut: HeldOut): FoldModel[] {
  const limit = Math.max(20, Math.floor(MOST_RESIDUAL_STEPS / heldOut.outcomes.length));
  return heldOut.outcomes.map(({ model, targetCentre, codings }, fold) => {
    const residuals = thinResiduals(residualsOfFold(heldOut, fold), limit);
    return {
      typicalAdditive: targetCentre + model.constant,
      weights: Array.from(model.weights),
      codings,
      ...residuals,
    };
  });
}

function describeInput(context: FitContext, readings: InputReadings, input: number, model: ColumnModel): FormulaInput {
  const { design } = context;
  const positions = design.columns.flatMap((column, at) => (column.input === input ? [at] : []));
  const weights = positions.map((at) => model.weights[at]);
  const coding = design.codings[input];
  const plain = coding.form === 'linear' && weights[0] < 0;
  const present = sortedSample(readings.recorded);
  const category = readings.kind === 'category';
  return {
    name: readings.input.column,
    kind: readings.kind,
    unit: readings.unit,
    transform: readings.input.transform,
    missing: readings.input.missing,
    unseenLevel: readings.input.unseenLevel,
    range: category ? null : rangeOf(readings.recorded),
    deciles: category ? null : Array.from({ length: 11 }, (_, tenth) => quantile(present, tenth / 10)),
    levels: category ? levelCounts(readings) : null,
    missingCount: readings.missingCount,
    typical: category ? commonestLevel(readings) : typicalReading(readings, context.read.weights),
    mass: massOf(context, positions, weights),
    hangs: plain ? 'float' : 'load',
    coding,
    weights,
  };
}

function levelCounts(readings: InputReadings): FormulaLevel[] {
  const counts = new Int32Array(readings.levels.length);
  readings.codes.forEach((code) => {
    if (code >= 0) counts[code] += 1;
  });
  return readings.levels.map((level, at) => ({ level, count: counts[at] }));
}

function commonestLevel(readings: InputReadings): string {
  return levelCounts(readings).reduce((best, level) => (level.count > best.count ? level : best)).level;
}

/** The weighted mean on the transformed scale, taken back. */
function typicalReading(readings: InputReadings, weights: Float64Array): number {
  const origin = readings.values.find((value) => !Number.isNaN(value)) ?? 0;
  let sum = 0;
  let weightSum = 0;
  readings.values.forEach((value, record) => {
    if (Number.isNaN(value)) return;
    sum += weights[record] * (value - origin);
    weightSum += weights[record];
  });
  const mean = origin + sum / weightSum;
  if (readings.input.transform === 'log') return Math.exp(mean);
  return readings.input.transform === 'square-root' ? mean * mean : mean;
}

/** √(Σ w contribution² / n): contributions have mean 0. */
function massOf(context: FitContext, positions: readonly number[], weights: readonly number[]): number {
  const { rowCount, data } = context.design;
  if (positions.length === 1) return Math.abs(weights[0]);
  let total = 0;
  for (let row = 0; row < rowCount; row += 1) {
    let contribution = 0;
    for (let at = 0; at < positions.length; at += 1) contribution += weights[at] * data[positions[at] * rowCount + row];
    total += contribution * contribution;
  }
  return Math.sqrt(total / rowCount);
}
