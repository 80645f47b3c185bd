import { HttpErrorResponse } from '@angular/common/http';
import type { ProblemCode, ProblemDetails } from './contract';

/** What a screen needs to say what went wrong and what to do. */
export interface Problem {
  /** The service's code; `unreachable` when no answer came, `unreadable` when the answer was not a problem. */
  readonly code: ProblemCode | 'unreachable' | 'unreadable';
  readonly status: number;
  readonly title: string;
  readonly detail: string;
  readonly requestId?: string;
  /** Line of the uploaded file. */
  readonly line?: number;
  /** Seconds to wait. */
  readonly retryAfter?: number;
  readonly errors: readonly FieldError[];
}

export interface FieldError {
  readonly detail: string;
  /** Path of the field in what was sent, such as `cautions/0`; empty for the whole. */
  readonly field: string;
}

const UNREACHABLE: Problem = {
  code: 'unreachable',
  status: 0,
  title: 'The desk did not answer',
  detail: 'Check the connection, then try again.',
  errors: [],
};

/** Turns whatever a call threw into a problem. Our own failures (not HTTP) are thrown on: they are not for people. */
export function problemOf(error: unknown): Problem {
  if (!(error instanceof HttpErrorResponse)) throw error;
  if (error.status === 0) return UNREACHABLE;
  const body = parsed(error.error);
  return isDetails(body) ? fromDetails(body, error) : unreadable(error);
}

function parsed(body: unknown): unknown {
  if (typeof body !== 'string') return body;
  try {
    return JSON.parse(body) as unknown;
  } catch {
    return undefined; // A proxy's page, say; the status is all there is to tell.
  }
}

function isDetails(body: unknown): body is ProblemDetails {
  if (typeof body !== 'object' || body === null) return false;
  return 'code' in body && typeof body.code === 'string' && 'title' in body && typeof body.title === 'string';
}

function fromDetails(details: ProblemDetails, error: HttpErrorResponse): Problem {
  return {
    code: details.code,
    status: error.status,
    title: details.title,
    detail: details.detail ?? '',
    requestId: details.requestId,
    line: details.line,
    retryAfter: details.retryAfter ?? secondsOf(error.headers.get('Retry-After')),
    errors: (details.errors ?? []).map(({ detail, pointer }) => ({ detail, field: fieldOf(pointer) })),
  };
}

function unreadable(error: HttpErrorResponse): Problem {
  return {
    code: 'unreadable',
    status: error.status,
    title: 'The desk answered in a way that this page cannot read',
    detail: `Try again in a minute. If it happens again, tell your administrator that the status was ${error.status}.`,
    retryAfter: secondsOf(error.headers.get('Retry-After')),
    errors: [],
  };
}

function secondsOf(header: string | null): number | undefined {
  return header !== null && /^\d+$/.test(header) ? Number(header) : undefined;
}

/** JSON Pointer as a URI fragment (RFC 6901, section 6) to a plain path: `#/cautions/0` to `cautions/0`. */
export function fieldOf(pointer: string): string {
  return decodeURIComponent(pointer)
    .replace(/^#?\/?/, '')
    .replaceAll('~1', '/')
    .replaceAll('~0', '~');
}

/** The first complaint about a field, for the line under it. */
export function errorOf(problem: Problem | undefined, field: string): string | undefined {
  return problem?.errors.find((error) => error.field === field)?.detail;
}
