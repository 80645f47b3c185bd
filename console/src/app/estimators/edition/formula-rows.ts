import type { Edition, SpecificationInput, Weight } from '../../api/contract';
import { formatFigure } from '../../ui/figure';
import { readingWords, termWords } from '../words/reading-words';

/** One term of the formula, in original units. */
export interface FormulaRow {
  readonly input: string;
  readonly part: string;
  readonly weight: number;
  /** What the weight multiplies, in words. */
  readonly times: string;
}

/** Intercept first, then every weight in the order of the edition. Weights of 0 add nothing and are left out. */
export function formulaRows(
  edition: Pick<Edition, 'weights'>,
  inputs: readonly SpecificationInput[] = [],
): readonly FormulaRow[] {
  return edition.weights
    .filter((weight) => weight.value !== 0)
    .map((weight) => ({
      input: weight.input,
      part: partOf(weight),
      weight: weight.value,
      times: timesOf(weight, inputs),
    }));
}

/** What the terms add up to: the value itself, or its logarithm. */
export function formulaWords(edition: Edition): string {
  const sum = `${formatFigure(edition.intercept, { significant: 6 })} plus the terms below`;
  if (edition.scale === 'original') return `Estimate, in ${edition.unit || 'target units'} = ${sum}.`;
  const smearing = smearingOf(edition);
  return smearing === null
    ? `Natural logarithm of the estimate = ${sum}.`
    : `Estimate = ${formatFigure(smearing, { significant: 6 })} × e to the power of (${sum}). The first factor, the smearing factor, turns a median into a mean.`;
}

/** The contract's edition may carry the smearing factor of a logged target; older answers do not. */
export function smearingOf(edition: object): number | null {
  const value: unknown = 'smearing' in edition ? edition.smearing : null;
  return typeof value === 'number' && Number.isFinite(value) ? value : null;
}

function partOf(weight: Weight): string {
  return weight.level ?? weight.term ?? '';
}

function timesOf(weight: Weight, inputs: readonly SpecificationInput[]): string {
  if (weight.level) return `1 when ${weight.input} is “${weight.level}”, else 0`;
  return weight.term ? termWords(weight.input, weight.term) : readingWords(weight.input, inputs);
}
