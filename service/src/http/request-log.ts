import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** The path alone; an invitation's token is left out, since whoever reads it could set a password. */
export const withoutToken = (url: string): string => url.split('?')[0].replace(/(\/invitations\/)[^/]+/, '$1…');

/** One line a call: method, path without its query, status, time. Neither headers nor bodies, so no secret can slip in. */
export function requestLog(log: Logger): RequestHandler {
  return pinoHttp({
    logger: log,
    genReqId: (request) => (request as unknown as { requestId: string }).requestId,
    serializers: {
      req: (request: { id: string; method: string; url: string }) => ({
        id: request.id,
        method: request.method,
        path: withoutToken(request.url),
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
    customLogLevel: (_request, response, error) => (error || response.statusCode >= 500 ? 'error' : 'debug'),
  });
}
