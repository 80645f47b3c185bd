import type { Estimate, Inputs, PublishedEstimator } from './contract';
import { EstimatesError } from './estimates-error';
import { readEstimate, readEstimator, readProblem } from './read-answers';

export interface Connection {
  readonly service: string;
  readonly key: string;
}

export type Fetch = (address: string, request: RequestInit) => Promise<Response>;

const TIMEOUT_MS = 20_000;

/** The two calls of the partner interface that the form makes. Every failure is an EstimatesError. */
export class EstimatesClient {
  constructor(
    private readonly connection: Connection,
    private readonly fetch: Fetch = (address, request) => globalThis.fetch(address, request),
  ) {}

  async describe(slug: string): Promise<PublishedEstimator> {
    return readEstimator(await this.call('GET', `v1/estimators/${encodeURIComponent(slug)}`));
  }

  async ask(slug: string, inputs: Inputs): Promise<Estimate> {
    return readEstimate(await this.call('POST', `v1/estimators/${encodeURIComponent(slug)}/estimates`, { inputs }));
  }

  private async call(method: 'GET' | 'POST', path: string, body?: object): Promise<unknown> {
    const address = addressOf(this.connection.service, path);
    const abort = new AbortController();
    const timer = setTimeout(() => abort.abort(), TIMEOUT_MS);
    try {
      const answer = await this.send(address, {
        method,
        signal: abort.signal,
        credentials: 'omit',
        headers: {
          Accept: 'application/json, application/problem+json',
          'X-Api-Key': this.connection.key,
          ...(body ? { 'Content-Type': 'application/json' } : {}),
        },
        body: body && JSON.stringify(body),
      });
      return await readBody(answer);
    } finally {
      clearTimeout(timer);
    }
  }

  /** A page learns no reason when a call is refused before it is answered: offline, blocked, or a site that is not listed. */
  private async send(address: string, request: RequestInit): Promise<Response> {
    try {
      return await this.fetch(address, request);
    } catch (error) {
      throw new EstimatesError('unreachable', 'No answer came from the desk.', {}, error);
    }
  }
}

async function readBody(answer: Response): Promise<unknown> {
  let body: unknown = null;
  try {
    body = await answer.json();
  } catch (error) {
    if (answer.ok) {
      throw new EstimatesError('not-understood', 'The answer is not JSON.', { status: answer.status }, error);
    }
  }
  if (!answer.ok) {
    throw readProblem(body, answer.status, answer.headers.get('Retry-After'));
  }
  return body;
}

function addressOf(service: string, path: string): string {
  try {
    const base = new URL(service.endsWith('/') ? service : `${service}/`);
    if (base.protocol === 'https:' || base.protocol === 'http:') {
      return new URL(path, base).href;
    }
  } catch (error) {
    throw new EstimatesError('service-invalid', `“${service}” is not an address.`, {}, error);
  }
  throw new EstimatesError('service-invalid', `“${service}” is not a web address.`);
}
