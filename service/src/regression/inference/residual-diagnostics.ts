import type { FinishedFit } from '../fit-result';
import type { FitDiagnostics, InfluentialRecord, ResidualPoint } from '../result';
import { shownEstimates } from './accuracy';
import { cooksDistance, leverages, sampledPositions } from './influence';
import type { TrainingFit } from './training-fit';

const MOST_PLOTTED = 2000;
const MOST_INFLUENTIAL = 20;

/** Residuals, leverages and Cook's distances, record by record. */
export function residualDiagnostics(
  fit: FinishedFit,
  training: TrainingFit,
): Pick<FitDiagnostics, 'influential' | 'residuals'> {
  const { context, lever, part } = fit;
  const positions = sampledPositions(context.read.count);
  const levers = lever === null ? null : leverages(context.design, part.problem, lever, positions);
  return {
    influential: levers === null ? [] : influentialRecords(fit, training, positions, levers),
    residuals: plottedRecords(fit, training, positions, levers),
  };
}

function influentialRecords(
  { context, solution, choice }: FinishedFit,
  training: TrainingFit,
  positions: Int32Array,
  levers: Float64Array,
): InfluentialRecord[] {
  const { plan, read, design } = context;
  const degrees = solution.degreesOfFreedom[choice.at] + (design.intercept ? 1 : 0);
  const all = Array.from(positions, (position, at) => {
    const record = plan.order[position];
    const residual = training.residuals[position];
    const distance = cooksDistance(residual, levers[at], degrees, training.variance);
    return {
      row: read.rows[record],
      cooksDistance: distance,
      leverage: levers[at],
      residual: residual / Math.sqrt(read.weights[record]),
    };
  });
  return all
    .sort((first, second) => second.cooksDistance - first.cooksDistance || first.row - second.row)
    .slice(0, MOST_INFLUENTIAL);
}

function plottedRecords(
  fit: FinishedFit,
  training: TrainingFit,
  positions: Int32Array,
  levers: Float64Array | null,
): ResidualPoint[] {
  const { context, heldOut } = fit;
  const { plan, read } = context;
  const shown = shownEstimates(context, heldOut);
  const points = Array.from(sampledPositions(positions.length, MOST_PLOTTED), (at) => {
    const position = positions[at];
    const record = plan.order[position];
    const residual = training.residuals[position] / Math.sqrt(read.weights[record]);
    return {
      row: read.rows[record],
      recorded: read.targetRecorded[record],
      heldOutEstimate: heldOut.foldOf[record] < 0 ? null : shown[record],
      fitted: read.target[record] - residual,
      residual,
      leverage: levers === null ? null : levers[at],
    };
  });
  return points.sort((first, second) => first.row - second.row);
}
