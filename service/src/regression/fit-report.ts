import type { FinishedFit } from './fit-result';
import { comparablePositions } from './inference/collinearity';
import { conditionNumber } from './inference/condition';
import type { FitReport } from './result';

const ROUTE_NAMES = {
  'least-squares': {
    moments: 'Cholesky of the moments',
    orthogonal: 'QR of the records with refinement',
    wide: 'QR of the records with refinement',
  },
  ridge: {
    moments: 'tridiagonal form of the moments',
    orthogonal: 'QR and SVD of the records',
    wide: 'tridiagonal form of the dual',
  },
  descent: {
    moments: 'coordinate descent on the moments',
    orthogonal: 'coordinate descent on moments of centred records',
    wide: 'coordinate descent on a working set of the records',
  },
} as const;

export function reportOf(fit: FinishedFit): FitReport {
  const { context, solution, choice, part } = fit;
  return {
    route: ROUTE_NAMES[context.settings.kind][context.route],
    iterations: solution.iterations,
    converged: solution.converged && fit.foldsConverged,
    gap: solution.gaps[choice.at],
    conditionNumber: conditionNumber(part, comparablePositions(part, context.design, context.read)),
    warnings: warningsOf(fit),
    recordCount: context.read.count,
    columnCount: context.design.columnCount,
    foldCount: context.plan.folds.length,
  };
}

function warningsOf({ context, solution, foldsConverged, lever, choice, plan, weights }: FinishedFit): string[] {
  const { read, design, specification } = context;
  const warnings = [...read.warnings];
  const constant = design.columns.filter((column) => column.leftOut === 'constant');
  for (const column of constant) {
    const name = specification.inputs[column.input].column;
    warnings.push(
      `${column.label === undefined ? name : `${name} (${column.label})`} is the same in every record and was left out.`,
    );
  }
  if (!solution.converged) warnings.push('The path did not reach the duality gap at every penalty.');
  if (!foldsConverged) warnings.push('Some folds did not reach the duality gap.');
  if (weights.every((weight) => weight === 0))
    warnings.push('Every weight is 0 at the chosen penalty: the estimate is the same for every case.');
  else if (lever === null)
    warnings.push('Too many inputs for a check of unusual combinations; ranges are still checked.');
  const heldOutCount = read.count;
  if (Math.ceil(specification.intervalLevel * (heldOutCount + 1) - 1e-9) > heldOutCount) {
    warnings.push('Too few records for an interval of this level; the widest held-out residual is used.');
  }
  const edge = specification.penalty.rule === 'minimum' && plan.lambdas.length > 1;
  if (edge && choice.at === plan.lambdas.length - 1)
    warnings.push('The smallest error stands at the weakest penalty of the path.');
  return warnings;
}
