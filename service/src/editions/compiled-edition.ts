import Ajv2020, { type ValidateFunction } from 'ajv/dist/2020';
import addFormats from 'ajv-formats';
import type { components } from '../../../openapi/types/desk';
import { DeskError } from '../errors';
import { RegressionError } from '../regression/errors';
import {
  evaluateFormula,
  type CaseInputs,
  type Contribution,
  type Evaluation as EngineEvaluation,
  type EvaluationFlag,
} from '../regression/formula/evaluate';
import type { Formula } from '../regression/formula/formula';
import type { EditionContent } from './editions-store';
import { inputPointer, inputProblems } from './input-problems';
import type { InputSchema } from './input-schema';

export type Evaluation = components['schemas']['Evaluation'];
export type CaseValues = components['schemas']['Inputs'];

/** An edition made ready for answering: its formula read and its input schema compiled, once. */
export class CompiledEdition {
  private readonly formula: Formula;
  private readonly validate: ValidateFunction;
  private readonly schema: InputSchema;
  private readonly labels: ReadonlyMap<string, string>;

  constructor(private readonly content: EditionContent) {
    this.formula = JSON.parse(content.formula) as Formula;
    this.schema = content.inputSchema;
    this.validate = compileSchema(content.inputSchema);
    this.labels = labelsOf(content.inputSchema);
  }

  get targetIsLogged(): boolean {
    return this.formula.target.transform === 'log';
  }

  /** The answer for one case; refuses a case that does not fit, with a pointer to each input. */
  evaluate(inputs: CaseValues, unit: string): Evaluation {
    if (!this.validate(inputs)) throw inputsInvalid(inputProblems(this.validate.errors ?? [], this.schema));
    const { value, interval, typical, scale, flags, contributions } = this.compute(inputs as CaseInputs);
    return {
      ...{ value, unit, typical, scale },
      interval: { level: interval.level, low: interval.low, high: interval.high },
      flags: flags.map(toFlag),
      contributions: contributions.map((part) => this.toContribution(part)),
      cautions: [...this.content.cautions],
    };
  }

  private compute(inputs: CaseInputs): EngineEvaluation {
    try {
      return evaluateFormula(this.formula, inputs);
    } catch (error) {
      if (!(error instanceof RegressionError) || error.column === null) throw error;
      throw inputsInvalid([{ pointer: inputPointer(error.column), detail: error.message }]);
    }
  }

  private toContribution({ input, arm, mass, contribution, hangs }: Contribution): Evaluation['contributions'][number] {
    return { input, label: this.labels.get(input) ?? input, arm, mass, contribution, float: hangs === 'float' };
  }
}

function inputsInvalid(errors: readonly { readonly pointer: string; readonly detail: string }[]): DeskError {
  return new DeskError(
    'inputs-invalid',
    `Mend the case and send it again: ${errors[0]?.detail ?? 'see the inputs of the estimator'}`,
    { errors },
  );
}

function toFlag({ code, input, message }: EvaluationFlag): Evaluation['flags'][number] {
  return { code: code === 'unknown-level' ? 'unseen-level' : code, input: input ?? null, message };
}

/** The schema is our own (inputSchemaOf); checking it against the meta-schema as well would cost far more than compiling it. */
function compileSchema(schema: InputSchema): ValidateFunction {
  const ajv = new Ajv2020({
    strict: false,
    allErrors: true,
    allowUnionTypes: true,
    meta: false,
    validateSchema: false,
  });
  addFormats(ajv, ['date']);
  return ajv.compile(schema);
}

function labelsOf(schema: InputSchema): ReadonlyMap<string, string> {
  const properties = Object.entries(
    (schema['properties'] ?? {}) as Readonly<Record<string, { readonly title?: unknown }>>,
  );
  return new Map(properties.map(([name, { title }]) => [name, typeof title === 'string' ? title : name]));
}
