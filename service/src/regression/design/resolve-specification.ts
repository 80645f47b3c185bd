import { RegressionError } from '../errors';
import type {
  FitMethod,
  FitSpecification,
  InputKind,
  InputSpecification,
  InputTransform,
  MissingRule,
  PenaltySpecification,
  RowFilter,
  SignLimit,
  TargetSpecification,
  UnseenLevelRule,
  ValidationScheme,
  ExtraSpecification,
} from '../specification';

export interface ResolvedInput {
  readonly column: string;
  readonly kind: InputKind | null;
  readonly transform: InputTransform;
  readonly missing: MissingRule;
  readonly penaltyFactor: number;
  readonly sign: SignLimit;
  readonly knots: number;
  readonly unseenLevel: UnseenLevelRule;
}

export interface ResolvedValidation {
  readonly scheme: ValidationScheme;
  readonly folds: number;
  readonly column: string | null;
  readonly seed: number;
  readonly gap: number;
}

/** A specification with every default filled in and every rule between its fields checked. */
export interface ResolvedSpecification {
  readonly target: TargetSpecification;
  readonly inputs: readonly ResolvedInput[];
  readonly weightColumn: string | null;
  readonly rowFilter: RowFilter | null;
  readonly method: FitMethod;
  /** α of the objective. */
  readonly mixing: number;
  readonly penalty: PenaltySpecification;
  readonly validation: ResolvedValidation;
  readonly intervalLevel: number;
  readonly intercept: boolean;
  readonly extras: ExtraSpecification;
}

const DEFAULT_FOLDS = 10;
const DEFAULT_LEVEL = 0.9;
const DEFAULT_KNOTS = 4;
const RIDGE_RULES: readonly string[] = ['evidence', 'prior', 'leave-one-out', 'generalised'];

export function resolveSpecification(specification: FitSpecification): ResolvedSpecification {
  const resolved: ResolvedSpecification = {
    target: specification.target,
    inputs: resolveInputs(specification),
    weightColumn: specification.weightColumn ?? null,
    rowFilter: specification.rowFilter ?? null,
    method: specification.method,
    mixing: resolveMixing(specification),
    penalty: resolvePenalty(specification),
    validation: resolveValidation(specification),
    intervalLevel: specification.intervalLevel ?? DEFAULT_LEVEL,
    intercept: specification.intercept ?? true,
    extras: specification.extras ?? {},
  };
  const filled = resolved.intercept ? undefined : resolved.inputs.find((input) => input.missing === 'typical');
  refuseUnless(
    filled === undefined,
    'Without an intercept there is no typical value to put in for a missing reading.',
    filled?.column,
  );
  refuseUnless(
    resolved.intervalLevel > 0 && resolved.intervalLevel < 1,
    'The interval level must lie between 0 and 1.',
  );
  return resolved;
}

function refuseUnless(condition: boolean, message: string, column: string | null = null): void {
  if (!condition) throw new RegressionError('bad-specification', message, column);
}

function resolveInputs(specification: FitSpecification): readonly ResolvedInput[] {
  refuseUnless(specification.inputs.length > 0, 'A fit needs at least one input.');
  const seen = new Set<string>([specification.target.column]);
  return specification.inputs.map((input) => {
    refuseUnless(
      !seen.has(input.column),
      `${input.column} is used twice. Name each column once, as target or as input.`,
      input.column,
    );
    seen.add(input.column);
    return resolveInput(input);
  });
}

function resolveInput(input: InputSpecification): ResolvedInput {
  const resolved: ResolvedInput = {
    column: input.column,
    kind: input.kind ?? null,
    transform: input.transform ?? 'none',
    missing: input.missing ?? 'refuse',
    penaltyFactor: input.penaltyFactor ?? 1,
    sign: input.sign ?? 'any',
    knots: input.knots ?? DEFAULT_KNOTS,
    unseenLevel: input.unseenLevel ?? 'refuse',
  };
  const { column, penaltyFactor, sign, transform, knots } = resolved;
  refuseUnless(
    Number.isFinite(penaltyFactor) && penaltyFactor >= 0,
    `The penalty factor of ${column} must be 0 or more.`,
    column,
  );
  refuseUnless(
    sign === 'any' || transform !== 'spline',
    `A limit on the sign has no meaning for ${column}, which is a spline.`,
    column,
  );
  refuseUnless(
    Number.isInteger(knots) && knots >= 3 && knots <= 7,
    `The spline of ${column} needs 3 to 7 knots.`,
    column,
  );
  return resolved;
}

function resolveMixing(specification: FitSpecification): number {
  if (specification.method === 'lasso') return 1;
  if (specification.method !== 'elastic-net') return 0;
  const mixing = specification.mixing ?? 0.5;
  refuseUnless(
    mixing > 0 && mixing < 1,
    'The mixing of an elastic net must lie strictly between 0 (ridge) and 1 (lasso).',
  );
  return mixing;
}

function resolvePenalty(specification: FitSpecification): PenaltySpecification {
  if (specification.method === 'least-squares') return { rule: 'fixed', value: 0 };
  const penalty = specification.penalty ?? { rule: 'minimum' };
  const { rule, value } = penalty;
  refuseUnless(
    specification.method === 'ridge' || !RIDGE_RULES.includes(rule),
    `The rule ${rule} exists for ridge only. Choose minimum, one-standard-error or fixed.`,
  );
  if (rule === 'fixed')
    refuseUnless(
      value !== undefined && Number.isFinite(value) && value >= 0,
      'A fixed penalty needs a value of 0 or more.',
    );
  if (rule === 'prior')
    refuseUnless(
      value !== undefined && Number.isFinite(value) && value > 0,
      'A prior needs its standard deviation, above 0.',
    );
  return penalty;
}

function resolveValidation(specification: FitSpecification): ResolvedValidation {
  const given = specification.validation ?? { scheme: 'k-fold' };
  const folds = given.folds ?? DEFAULT_FOLDS;
  refuseUnless(Number.isInteger(folds) && folds >= 2, 'Validation needs at least 2 folds.');
  refuseUnless(
    given.scheme === 'k-fold' || given.column !== undefined,
    `Validation by ${given.scheme} folds needs its column.`,
  );
  const gap = given.gap ?? 0;
  refuseUnless(Number.isFinite(gap) && gap >= 0, 'The gap between training and held-out records must be 0 or more.');
  return { scheme: given.scheme, folds, column: given.column ?? null, seed: given.seed ?? 1, gap };
}
