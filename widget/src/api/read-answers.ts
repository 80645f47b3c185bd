import type { Estimate, Problem, PublishedEstimator } from './contract';
import { EstimatesError, FieldProblem } from './estimates-error';

type Unknown = Readonly<Record<string, unknown>>;

export function isObject(value: unknown): value is Unknown {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** Checks what the form reads, so that an answer of another program never becomes a figure on the page. */
export function readEstimate(answer: unknown): Estimate {
  if (!isEstimate(answer)) {
    throw new EstimatesError('not-understood', 'The answer is not an estimate.');
  }
  return answer;
}

export function readEstimator(answer: unknown): PublishedEstimator {
  if (!isEstimator(answer)) {
    throw new EstimatesError('not-understood', 'The answer does not describe an estimator.');
  }
  return answer;
}

/** RFC 9457; a member of the wrong type is ignored, as the RFC has it. */
export function readProblem(answer: unknown, status: number, retryAfter: string | null): EstimatesError {
  const problem: Unknown = isObject(answer) ? answer : {};
  const text = (member: unknown): string | undefined =>
    typeof member === 'string' && member !== '' ? member : undefined;
  const seconds = typeof problem['retryAfter'] === 'number' ? problem['retryAfter'] : Number(retryAfter ?? NaN);
  const code = text(problem['code']);
  return new EstimatesError(
    code === undefined ? 'not-understood' : (code as Problem['code']),
    text(problem['title']) ?? `The desk answered with status ${status}.`,
    {
      status,
      detail: text(problem['detail']),
      requestId: text(problem['requestId']),
      retryAfterSeconds: Number.isFinite(seconds) ? seconds : undefined,
      fields: readFieldProblems(problem['errors']),
    },
  );
}

function readFieldProblems(errors: unknown): readonly FieldProblem[] {
  const list: readonly unknown[] = Array.isArray(errors) ? errors : [];
  return list
    .filter(isObject)
    .flatMap(({ detail, pointer }) =>
      typeof detail === 'string' ? [{ detail, input: typeof pointer === 'string' ? inputOf(pointer) : null }] : [],
    );
}

/** The pointer is a URI fragment ("#/inputs/length_overall"), escaped by RFC 6901 and then by percent. */
function inputOf(pointer: string): string | null {
  const name = /^#?\/inputs\/([^/]+)$/.exec(pointer)?.[1];
  if (name === undefined) {
    return null;
  }
  try {
    return decodeURIComponent(name).replace(/~1/g, '/').replace(/~0/g, '~');
  } catch (error) {
    if (error instanceof URIError) {
      return null;
    }
    throw error;
  }
}

function isEstimator(answer: unknown): answer is PublishedEstimator {
  return (
    isObject(answer) &&
    ['slug', 'name', 'targetName', 'unit'].every((member) => typeof answer[member] === 'string') &&
    typeof answer['edition'] === 'number' &&
    isObject(answer['inputs']) &&
    isTextList(answer['cautions'])
  );
}

function isEstimate(answer: unknown): answer is Estimate {
  return (
    isObject(answer) &&
    ['value', 'typical', 'edition'].every((member) => Number.isFinite(answer[member])) &&
    ['id', 'unit', 'estimator', 'issuedAt'].every((member) => typeof answer[member] === 'string') &&
    (answer['scale'] === 'original' || answer['scale'] === 'log') &&
    isInterval(answer['interval']) &&
    isListOf(answer['flags'], (flag) => typeof flag['message'] === 'string') &&
    isListOf(answer['contributions'], isContribution) &&
    isTextList(answer['cautions'])
  );
}

function isInterval(value: unknown): boolean {
  const isEnd = (end: unknown): boolean => end === null || Number.isFinite(end);
  return isObject(value) && Number.isFinite(value['level']) && isEnd(value['low']) && isEnd(value['high']);
}

function isContribution(value: Unknown): boolean {
  return (
    typeof value['input'] === 'string' &&
    ['arm', 'mass', 'contribution'].every((member) => Number.isFinite(value[member]))
  );
}

function isListOf(value: unknown, isItem: (item: Unknown) => boolean): boolean {
  return Array.isArray(value) && value.every((item: unknown) => isObject(item) && isItem(item));
}

function isTextList(value: unknown): boolean {
  return Array.isArray(value) && value.every((item) => typeof item === 'string');
}
