import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Logger } from 'pino';
import { DeskError } from '../errors';

interface HttpErrorLike {
  readonly status: number;
  readonly type?: string;
  /** Bytes that the body parser takes. */
  readonly limit?: number;
}

const isHttpError = (error: unknown): error is HttpErrorLike =>
  error instanceof Error && typeof (error as Partial<HttpErrorLike>).status === 'number';

/** What the body parser, the router and the CSRF guard throw, in our words. */
function translate(error: unknown): DeskError | null {
  if (error instanceof DeskError) return error;
  if (!isHttpError(error)) return null;
  if ((error as { code?: string }).code === 'EBADCSRFTOKEN') {
    return new DeskError('request-forged', 'Send the header X-XSRF-TOKEN with the value of the cookie XSRF-TOKEN.');
  }
  if (error.status === 404) return new DeskError('not-found', 'There is nothing at this address.', { cause: error });
  if (error.status === 413) {
    const most = error.limit === undefined ? 'is taken' : `${Math.round(error.limit / 1024 / 1024)} MB`;
    return new DeskError('body-too-large', `The body is larger than ${most}. Send less at once.`, { cause: error });
  }
  if (error.type === 'entity.parse.failed') {
    return new DeskError('body-unreadable', 'The body is not valid JSON. Mend it and send it again.', { cause: error });
  }
  if (error.status >= 400 && error.status < 500) {
    return new DeskError('request-invalid', 'The request could not be read. Check its address and headers.', {
      cause: error,
    });
  }
  return null;
}

/** The one place that answers errors: RFC 9457. An unknown error is logged whole and told only by its number. */
export function problemDetails(log: Logger): ErrorRequestHandler {
  return (error: unknown, request, response, next) => {
    const known = translate(error);
    if (!known) log.error({ err: error, requestId: request.requestId }, 'unexpected error');
    if (response.headersSent) {
      next(error);
      return;
    }
    const problem = known ?? new DeskError('internal', `Tell the desk this number: ${request.requestId}.`);
    const { errors, line, retryAfter } = problem.more;
    if (retryAfter !== undefined) response.setHeader('Retry-After', String(retryAfter));
    if (problem.status === 401)
      response.setHeader('WWW-Authenticate', problem.code.startsWith('key-') ? 'ApiKey header="X-Api-Key"' : 'Session');
    response
      .status(problem.status)
      .type('application/problem+json')
      .send(
        JSON.stringify({
          type: `/docs/problems#${problem.code}`,
          title: problem.title,
          status: problem.status,
          detail: problem.detail,
          code: problem.code,
          requestId: request.requestId,
          ...(errors && { errors }),
          ...(line !== undefined && { line }),
          ...(retryAfter !== undefined && { retryAfter }),
        }),
      );
  };
}

export const noSuchAddress: RequestHandler = (request, _response, next) => {
  next(new DeskError('not-found', `There is nothing at ${request.path}. The addresses are listed at /docs.`));
};
