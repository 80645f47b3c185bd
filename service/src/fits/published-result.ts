import type { components } from '../../../openapi/types/desk';
import type { Formula, FormulaInput } from '../regression/formula/formula';
import type { FitResult as EngineResult, FitWeight } from '../regression/result';

export type PublishedResult = components['schemas']['FitResult'];
type Weight = components['schemas']['Weight'];

/** The engine's result with the contract's names; everything else that the engine found stays beside them. */
export function publishedResult(result: EngineResult, formula: Formula): PublishedResult {
  const chosenBy = (rule: string): number | null =>
    result.penalty.choices.find((choice) => choice.rule === rule)?.lambda ?? null;
  const penalty = {
    ...result.penalty,
    minimumLambda: chosenBy('minimum'),
    oneStandardErrorLambda: chosenBy('one-standard-error'),
  };
  const path = result.path.map((point) => ({ ...point, standardised: [...point.standardised] }));
  const report = { ...result.report, warnings: [...result.report.warnings] };
  return { ...result, penalty, weights: weightsOf(result.weights, formula), path, report };
}

function weightsOf(weights: readonly FitWeight[], formula: Formula): Weight[] {
  const byName = new Map(formula.inputs.map((input) => [input.name, input]));
  const placed = new Map<string, number>();
  return weights.map((weight) => {
    const place = placed.get(weight.input) ?? 0;
    placed.set(weight.input, place + 1);
    return { ...weight, ...rowName(weight, byName.get(weight.input), place) };
  });
}

/** A category's rows carry their level; the columns of a spline and the missing-reading indicator are terms. */
function rowName(
  weight: FitWeight,
  input: FormulaInput | undefined,
  place: number,
): { level: string | null; term: string | null } {
  const name = weight.level ?? null;
  const isLevel = input?.kind === 'category' && place < (input.levels?.length ?? 0);
  return isLevel ? { level: name, term: null } : { level: null, term: name };
}
