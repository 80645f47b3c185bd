import type { components } from '../../../openapi/types/desk';
import type {
  FitSpecification,
  InputSpecification,
  PenaltySpecification,
  ValidationSpecification,
} from '../regression/specification';

export type Specification = components['schemas']['Specification'];
export type SpecificationInput = components['schemas']['SpecificationInput'];

/** The contract's specification as the engine takes it: null and absent are one, and the words for the form stay behind. */
export function toEngineSpecification(specification: Specification): FitSpecification {
  const { target, inputs, weightColumn, rowFilter, method, mixing, penalty, validation } = specification;
  const { intervalLevel, intercept, extras } = specification;
  return {
    target: { column: target.column, transform: target.transform ?? 'none' },
    inputs: inputs.map(toEngineInput),
    method,
    ...(weightColumn && { weightColumn }),
    ...(rowFilter && { rowFilter }),
    ...(mixing !== undefined && { mixing }),
    ...(method !== 'least-squares' && { penalty: toEnginePenalty(penalty) }),
    ...(validation && { validation: toEngineValidation(validation) }),
    ...(intervalLevel !== undefined && { intervalLevel }),
    ...(intercept !== undefined && { intercept }),
    ...(extras && { extras }),
  };
}

function toEngineInput(input: SpecificationInput): InputSpecification {
  const { column, kind, transform, knots, missing, unseen, penaltyFactor, sign } = input;
  return { column, kind, transform, knots, missing, penaltyFactor, sign, unseenLevel: unseen };
}

function toEnginePenalty(penalty: Specification['penalty']): PenaltySpecification {
  return { rule: penalty?.rule ?? 'minimum', ...(typeof penalty?.value === 'number' && { value: penalty.value }) };
}

function toEngineValidation(validation: NonNullable<Specification['validation']>): ValidationSpecification {
  const { scheme = 'k-fold', folds, column, gap, seed } = validation;
  return { scheme, folds, gap, seed, ...(column && scheme !== 'k-fold' && { column }) };
}

/** Every column that a fit reads. */
export function columnsOf(specification: Specification): readonly string[] {
  const { target, inputs, weightColumn, rowFilter, validation } = specification;
  const named = [
    target.column,
    ...inputs.map((input) => input.column),
    weightColumn,
    rowFilter?.column,
    validation?.column,
  ];
  return [...new Set(named.filter((name): name is string => Boolean(name)))];
}
