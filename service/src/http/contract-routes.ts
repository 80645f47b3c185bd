import { Router, type NextFunction, type Request, type RequestHandler, type Response } from 'express';
import type { ErrorObject, ValidateFunction } from 'ajv/dist/2020';
import { DeskError, type PointedError } from '../errors';
import type { Contract, Operation } from './contract';

type OperationShape = {
  parameters: { path?: unknown; query?: unknown };
  requestBody?: unknown;
  responses: Record<number, unknown>;
};
type Content<Part> = Part extends { content: { 'application/json': infer Body } } ? Body : undefined;
type Success<Responses> = Responses extends { 200: infer Answer }
  ? Answer
  : Responses extends { 201: infer Answer }
    ? Answer
    : Responses extends { 202: infer Answer }
      ? Answer
      : undefined;

export type PathOf<Op extends OperationShape> = NonNullable<Op['parameters']['path']>;
export type QueryOf<Op extends OperationShape> = NonNullable<Op['parameters']['query']>;
export type BodyOf<Op extends OperationShape> = Content<Op['requestBody']>;
export type AnswerOf<Op extends OperationShape> = Content<Success<Op['responses']>>;

/** A call that has passed the contract: parameters have their types and defaults. */
export interface Call<Op extends OperationShape> {
  readonly path: PathOf<Op>;
  readonly query: QueryOf<Op>;
  readonly body: BodyOf<Op>;
  readonly request: Request;
  readonly response: Response;
}

function pointed(errors: readonly ErrorObject[] | null | undefined): PointedError[] {
  return (errors ?? []).map((error) => {
    const missing = error.keyword === 'required' ? `/${String(error.params['missingProperty'])}` : '';
    const unknown = error.keyword === 'additionalProperties' ? `: ${String(error.params['additionalProperty'])}` : '';
    const allowed = error.keyword === 'enum' ? `: ${(error.params['allowedValues'] as unknown[]).join(', ')}` : '';
    return {
      pointer: `#${error.instancePath}${missing}`,
      detail: `${error.message ?? 'is not valid'}${unknown}${allowed}`,
    };
  });
}

function requireValid(validate: ValidateFunction, value: unknown, place: string): void {
  if (validate(value)) return;
  const errors = pointed(validate.errors);
  const where = errors[0]
    ? `${errors[0].pointer === '#' ? place : `${place} ${errors[0].pointer}`} ${errors[0].detail}`
    : place;
  throw new DeskError('request-invalid', `Mend the request and send it again: ${where}.`, { errors });
}

export interface ContractRoutesOptions {
  /** Runs before validation, with the operation's name: who may call it. */
  readonly guard: (operationId: string) => RequestHandler;
  /** In tests: an answer that does not fit the contract is an error. */
  readonly validateAnswers: boolean;
}

/**
 * Mounts handlers by operation. Path, method, status and validation come from the contract, so a route cannot exist
 * without an entry there; `requireComplete` refuses to start when an entry has no route.
 */
export class ContractRoutes<Operations extends { [Id in keyof Operations]: OperationShape }> {
  readonly router = Router();
  private readonly mounted = new Set<string>();

  constructor(
    private readonly contract: Contract,
    private readonly options: ContractRoutesOptions,
  ) {}

  /** A handler whose result is answered as JSON with the contract's status. */
  answer<Id extends keyof Operations & string>(
    id: Id,
    handler: (call: Call<Operations[Id]>) => Promise<AnswerOf<Operations[Id]>> | AnswerOf<Operations[Id]>,
  ): void {
    this.handle(id, async (call) => {
      const answer = await handler(call);
      const { successStatus } = this.contract.operation(id);
      if (successStatus === 204) {
        call.response.status(204).end();
        return;
      }
      this.checkAnswer(id, answer);
      call.response.status(successStatus).json(answer);
    });
  }

  /** A handler that writes the answer itself: files and event streams. */
  handle<Id extends keyof Operations & string>(
    id: Id,
    handler: (call: Call<Operations[Id]>) => Promise<void> | void,
  ): void {
    const operation = this.contract.operation(id);
    this.mounted.add(id);
    this.router[operation.method](
      operation.path,
      this.options.guard(id),
      async (request: Request, response: Response) => {
        await handler(this.validCall<Operations[Id]>(operation, request, response));
      },
    );
  }

  requireComplete(): void {
    const missing = this.contract.operations.filter((operation) => !this.mounted.has(operation.id));
    if (missing.length > 0) throw new Error(`No route for ${missing.map((operation) => operation.id).join(', ')}.`);
  }

  /** For a path of the contract called with a method it does not have. Mounted last. */
  refuseOtherMethods(): void {
    for (const [path, operations] of groupByPath(this.contract.operations)) {
      const allow = operations.map((operation) => operation.method.toUpperCase()).join(', ');
      this.router.all(path, (_request: Request, response: Response, next: NextFunction) => {
        response.setHeader('Allow', allow);
        next(new DeskError('method-not-allowed', `Use ${allow}.`));
      });
    }
  }

  private validCall<Op extends OperationShape>(operation: Operation, request: Request, response: Response): Call<Op> {
    const validators = this.contract.validators(operation.id);
    const path = { ...request.params };
    const query = { ...request.query };
    requireValid(validators.path, path, 'The address');
    requireValid(validators.query, query, 'The query');
    if (validators.body) {
      if (!request.is('application/json')) {
        throw new DeskError('media-type-unsupported', 'Send the body as application/json.');
      }
      requireValid(validators.body, request.body, 'The body');
    }
    return {
      path: path as PathOf<Op>,
      query: query as QueryOf<Op>,
      body: request.body as BodyOf<Op>,
      request,
      response,
    };
  }

  private checkAnswer(id: string, answer: unknown): void {
    if (!this.options.validateAnswers) return;
    const validate = this.contract.validators(id).answer;
    const asSent: unknown = JSON.parse(JSON.stringify(answer));
    if (validate && !validate(asSent)) {
      throw new Error(`The answer of ${id} does not fit the contract: ${JSON.stringify(pointed(validate.errors))}`);
    }
  }
}

function groupByPath(operations: readonly Operation[]): Map<string, Operation[]> {
  const groups = new Map<string, Operation[]>();
  for (const operation of operations) groups.set(operation.path, [...(groups.get(operation.path) ?? []), operation]);
  return groups;
}
