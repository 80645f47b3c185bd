import type { Specification, SpecificationInput } from '../../api/contract';
import { methodName } from './method-words';
import { formatShare } from '../../ui/figure';
import { exact } from './exact';

/** The specification read back as sentences, in the order in which it was asked for. */
export function specificationWords(specification: Specification, unit: string): readonly string[] {
  return [
    targetWords(specification),
    inputWords(specification),
    ...filterWords(specification),
    methodWords(specification),
    ...penaltyWords(specification, unit),
    validationWords(specification),
    `Intervals are to hold ${formatShare(specification.intervalLevel ?? 0.9)} of cases.`,
    ...(specification.weightColumn ? [`Records weigh as ${specification.weightColumn} says.`] : []),
    ...(specification.intercept === false ? ['The formula is forced through the origin.'] : []),
  ];
}

function targetWords({ target }: Specification): string {
  return target.transform === 'log'
    ? `Estimate ${target.column} on the log scale, so that inputs act as factors.`
    : `Estimate ${target.column} as it stands.`;
}

function inputWords({ inputs }: Specification): string {
  const columns = inputs.length === 1 ? 'one input' : `${inputs.length} inputs`;
  return `From ${columns}: ${inputs.map((input) => input.column).join(', ')}.`;
}

function filterWords({ rowFilter }: Specification): readonly string[] {
  if (!rowFilter) return [];
  const { column, equals, from, to } = rowFilter;
  if (equals) return [`Only records whose ${column} is ${equals.join(' or ')}.`];
  const ends = [from === undefined ? '' : `from ${exact(from)}`, to === undefined ? '' : `to ${exact(to)}`].filter(
    Boolean,
  );
  return [`Only records whose ${column} runs ${ends.join(' ')} (dates as days since 1970-01-01).`];
}

function methodWords(specification: Specification): string {
  const name = methodName(specification.method);
  if (specification.method !== 'elastic-net') return `Method: ${name.toLowerCase()}.`;
  return `Method: elastic net with a mixing of ${exact(specification.mixing ?? 0.5)} (1 is lasso, 0 is ridge).`;
}

function penaltyWords(specification: Specification, unit: string): readonly string[] {
  if (specification.method === 'least-squares') return [];
  const value = specification.penalty?.value;
  const figure = value === null || value === undefined ? 'not stated' : exact(value);
  switch (specification.penalty?.rule ?? 'minimum') {
    case 'minimum':
      return ['Penalty: where the held-out error is least.'];
    case 'one-standard-error':
      return ['Penalty: the strongest within one standard error of the least held-out error.'];
    case 'leave-one-out':
      return ['Penalty: where the exact leave-one-out error is least.'];
    case 'generalised':
      return ['Penalty: where generalised cross-validation is least.'];
    case 'evidence':
      return ['Penalty: where the evidence (marginal likelihood) is greatest.'];
    case 'prior':
      return [
        `Penalty: from the prior that a standardised weight has a standard deviation of ${unit ? `${figure} ${unit}` : figure}.`,
      ];
    case 'fixed':
      return [`Penalty: λ fixed at ${figure}.`];
  }
}

function validationWords({ validation }: Specification): string {
  const folds = validation?.folds ?? 10;
  switch (validation?.scheme ?? 'k-fold') {
    case 'k-fold':
      return `Held out: ${folds} folds at random, seed ${validation?.seed ?? 1}.`;
    case 'grouped':
      return `Held out: ${folds} folds that keep each ${validation?.column ?? 'group'} together, seed ${validation?.seed ?? 1}.`;
    case 'forward':
      return `Held out: ${folds} folds forward in ${validation?.column ?? 'time'}${validation?.gap ? `, leaving out ${exact(validation.gap)} between past and future` : ''}.`;
  }
}

/** What was said of one input beyond its column; empty when it was taken as it stands. */
export function inputRemarks(input: SpecificationInput): readonly string[] {
  const remarks: string[] = [];
  if (input.kind) remarks.push(`read as ${input.kind === 'numeric' ? 'a number' : 'a category'}`);
  if (input.transform === 'log') remarks.push('on the log scale');
  if (input.transform === 'square-root') remarks.push('by its square root');
  if (input.transform === 'spline') remarks.push('as a smooth curve (spline)');
  if (input.missing === 'typical') remarks.push('a missing reading counts as typical');
  if (input.unseen === 'other') remarks.push('an unknown level counts as other');
  if (input.penaltyFactor !== undefined && input.penaltyFactor !== 1) {
    remarks.push(input.penaltyFactor === 0 ? 'left free of the penalty' : `penalty × ${exact(input.penaltyFactor)}`);
  }
  if (input.sign === 'not-negative') remarks.push('weight not below zero');
  if (input.sign === 'not-positive') remarks.push('weight not above zero');
  return remarks;
}
