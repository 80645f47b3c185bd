import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import Ajv2020, { type ValidateFunction } from 'ajv/dist/2020';
import addFormats from 'ajv-formats';
import { rootFolder } from '../root-folder';

type Json = Record<string, unknown>;
export type HttpMethod = 'get' | 'post' | 'put' | 'patch' | 'delete';
const httpMethods: readonly HttpMethod[] = ['get', 'post', 'put', 'patch', 'delete'];

export interface Operation {
  readonly id: string;
  readonly method: HttpMethod;
  /** As Express writes it: `/people/:id`. */
  readonly path: string;
  readonly successStatus: number;
  readonly bodyMediaType: string | null;
  readonly answerMediaType: string | null;
}

export interface OperationValidators {
  readonly path: ValidateFunction;
  readonly query: ValidateFunction;
  readonly body: ValidateFunction | null;
  readonly answer: ValidateFunction | null;
  readonly problem: ValidateFunction;
}

const pointerPart = (text: string): string => encodeURIComponent(text.replaceAll('~', '~0').replaceAll('/', '~1'));

/** One bundled OpenAPI document: its operations, and validators compiled when an operation is first called. */
export class Contract {
  readonly operations: readonly Operation[];
  private readonly strict: Ajv2020;
  private readonly coercing: Ajv2020;
  private readonly compiled = new Map<string, OperationValidators>();

  constructor(
    readonly name: string,
    readonly document: Json,
  ) {
    this.strict = this.newAjv(false);
    this.coercing = this.newAjv(true);
    this.operations = this.listOperations();
  }

  operation(id: string): Operation {
    const found = this.operations.find((operation) => operation.id === id);
    if (!found) throw new Error(`The contract ${this.name} has no operation ${id}.`);
    return found;
  }

  validators(id: string): OperationValidators {
    const known = this.compiled.get(id);
    if (known) return known;
    const made = this.compileValidators(this.operation(id));
    this.compiled.set(id, made);
    return made;
  }

  /** A validator for one named schema. */
  schemaValidator(name: string): ValidateFunction {
    return this.strict.compile({ $ref: `${this.name}#/components/schemas/${name}` });
  }

  private newAjv(coerceTypes: boolean): Ajv2020 {
    const ajv = new Ajv2020({ strict: false, allErrors: false, useDefaults: true, coerceTypes, allowUnionTypes: true });
    addFormats(ajv);
    ajv.addFormat('binary', true);
    ajv.addSchema(this.document, this.name);
    return ajv;
  }

  private listOperations(): Operation[] {
    const paths = this.document['paths'] as Record<string, Json>;
    return Object.entries(paths).flatMap(([path, item]) =>
      httpMethods.filter((method) => method in item).map((method) => this.describe(path, method, item[method] as Json)),
    );
  }

  private describe(path: string, method: HttpMethod, operation: Json): Operation {
    const responses = operation['responses'] as Record<string, Json>;
    const success = Object.keys(responses).find((status) => status.startsWith('2'));
    const body = operation['requestBody'] as Json | undefined;
    return {
      id: operation['operationId'] as string,
      method,
      path: path.replace(/\{(\w+)\}/g, ':$1'),
      successStatus: Number(success),
      bodyMediaType: body ? (Object.keys(body['content'] as Json)[0] ?? null) : null,
      answerMediaType: Object.keys((responses[success ?? '']?.['content'] as Json | undefined) ?? {})[0] ?? null,
    };
  }

  private compileValidators(operation: Operation): OperationValidators {
    const path = operation.path.replace(/:(\w+)/g, '{$1}');
    const base = `${this.name}#/paths/${pointerPart(path)}/${operation.method}`;
    const content = (place: string, mediaType: string): ValidateFunction =>
      this.strict.compile({ $ref: `${base}/${place}/content/${pointerPart(mediaType)}/schema` });
    const json = (mediaType: string | null): boolean => mediaType === 'application/json';
    return {
      path: this.compileParameters(path, operation.method, 'path'),
      query: this.compileParameters(path, operation.method, 'query'),
      body: json(operation.bodyMediaType) ? content('requestBody', operation.bodyMediaType as string) : null,
      answer: json(operation.answerMediaType)
        ? content(`responses/${operation.successStatus}`, operation.answerMediaType as string)
        : null,
      problem: this.schemaValidator('Problem'),
    };
  }

  private compileParameters(path: string, method: HttpMethod, place: 'path' | 'query'): ValidateFunction {
    const item = (this.document['paths'] as Record<string, Json>)[path];
    const listed = ((item[method] as Json)['parameters'] as Json[] | undefined) ?? [];
    const parameters = listed
      .map((parameter) => this.resolve(parameter))
      .filter((parameter) => parameter['in'] === place);
    return this.coercing.compile({
      type: 'object',
      additionalProperties: false,
      required: parameters.filter((parameter) => parameter['required']).map((parameter) => parameter['name']),
      properties: Object.fromEntries(
        parameters.map((parameter) => [parameter['name'], this.resolve(parameter['schema'] as Json)]),
      ),
    });
  }

  private resolve(value: Json): Json {
    const reference = value['$ref'];
    if (typeof reference !== 'string') return value;
    return reference
      .slice(2)
      .split('/')
      .reduce<unknown>((at, part) => (at as Json)[part], this.document) as Json;
  }
}

export function loadContract(name: 'desk' | 'partner'): Contract {
  const text = readFileSync(join(rootFolder, 'dist', 'openapi', `${name}.json`), 'utf8');
  return new Contract(name, JSON.parse(text) as Json);
}
