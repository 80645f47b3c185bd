import { EstimatesClient, Fetch } from './estimates-client';
import { EstimatesError } from './estimates-error';
import { estimateExample, estimatorExample } from './examples.fixture';

interface Sent {
  readonly address: string;
  readonly request: RequestInit;
}

/** Stands for the network: what is answered, and what was asked. */
function network(status: number, body: unknown, headers: Record<string, string> = {}): { fetch: Fetch; sent: Sent[] } {
  const sent: Sent[] = [];
  const answer = {
    ok: status < 400,
    status,
    headers: { get: (name: string) => headers[name] ?? null },
    json: () => (body instanceof Error ? Promise.reject(body) : Promise.resolve(body)),
  };
  return {
    sent,
    fetch: (address, request) => {
      sent.push({ address, request });
      return Promise.resolve(answer as Response);
    },
  };
}

function client({ fetch }: { fetch: Fetch }, service = 'https://desk.example'): EstimatesClient {
  return new EstimatesClient({ service, key: 'tb_embed_example' }, fetch);
}

async function failureOf(call: Promise<unknown>): Promise<EstimatesError> {
  const error: unknown = await call.then(
    () => new Error('the call did not fail'),
    (reason: unknown) => reason,
  );
  if (error instanceof EstimatesError) {
    return error;
  }
  throw error;
}

describe('EstimatesClient', () => {
  it.each([
    ['https://desk.example', 'https://desk.example/v1/estimators/refit-labour'],
    ['https://desk.example/', 'https://desk.example/v1/estimators/refit-labour'],
    ['https://desk.example/estimating', 'https://desk.example/estimating/v1/estimators/refit-labour'],
  ])('asks %s for the description, with the key in its header and no cookies', async (service, address) => {
    const net = network(200, estimatorExample());
    await client(net, service).describe('refit-labour');
    expect(net.sent[0].address).toBe(address);
    expect(net.sent[0].request).toMatchObject({
      method: 'GET',
      credentials: 'omit',
      headers: { 'X-Api-Key': 'tb_embed_example' },
    });
  });

  it('sends a case as JSON and hands back the estimate', async () => {
    const net = network(200, estimateExample());
    const estimate = await client(net).ask('refit-labour', { displacement: 9.8 });
    expect(estimate).toEqual(estimateExample());
    expect(net.sent[0].address).toBe('https://desk.example/v1/estimators/refit-labour/estimates');
    expect(net.sent[0].request.body).toBe('{"inputs":{"displacement":9.8}}');
  });

  it('keeps a slug from reaching another path', async () => {
    const net = network(200, estimatorExample());
    await client(net).describe('../people?x');
    expect(net.sent[0].address).toBe('https://desk.example/v1/estimators/..%2Fpeople%3Fx');
  });

  it('says that no answer came when the call is refused on the way', async () => {
    const failure = await failureOf(
      client({ fetch: () => Promise.reject(new TypeError('x')) }).describe('refit-labour'),
    );
    expect(failure.code).toBe('unreachable');
  });

  it.each(['desk.example', 'javascript:alert(1)', ''])('does not call the service "%s"', async (service) => {
    const net = network(200, estimatorExample());
    expect((await failureOf(client(net, service).describe('refit-labour'))).code).toBe('service-invalid');
    expect(net.sent).toHaveLength(0);
  });

  it("hands on the desk's problem", async () => {
    const failure = await failureOf(
      client(
        network(429, {
          code: 'rate-exceeded',
          title: 'Too many calls',
          detail: 'Wait a little.',
          requestId: 'r1',
          retryAfter: 12,
        }),
      ).ask('refit-labour', {}),
    );
    expect(failure).toMatchObject({
      code: 'rate-exceeded',
      message: 'Too many calls',
      details: { status: 429, detail: 'Wait a little.', requestId: 'r1', retryAfterSeconds: 12 },
    });
  });

  it('takes the wait from the header when the problem does not give it', async () => {
    const net = network(429, { code: 'rate-exceeded', title: 'Too many calls' }, { 'Retry-After': '7' });
    expect((await failureOf(client(net).ask('refit-labour', {}))).details.retryAfterSeconds).toBe(7);
  });

  it('names the input that each problem points to', async () => {
    const errors = [
      { pointer: '#/inputs/length_overall', detail: 'must be a number' },
      { pointer: '#/inputs/hull%20~1%20deck', detail: 'unknown level' },
      { pointer: '#/inputs', detail: 'must have rig' },
      { pointer: 3, detail: 'odd' },
    ];
    const net = network(422, { code: 'inputs-invalid', title: 'Inputs', errors });
    expect((await failureOf(client(net).ask('refit-labour', {}))).details.fields).toEqual([
      { input: 'length_overall', detail: 'must be a number' },
      { input: 'hull / deck', detail: 'unknown level' },
      { input: null, detail: 'must have rig' },
      { input: null, detail: 'odd' },
    ]);
  });

  it.each([502, 404])('does not take the page of a proxy (%d) for an answer', async (status) => {
    const failure = await failureOf(client(network(status, new SyntaxError('html'))).describe('refit-labour'));
    expect(failure).toMatchObject({ code: 'not-understood', details: { status } });
  });

  it.each<[string, object]>([
    ['no value', { value: undefined }],
    ['a value that is text', { value: '512' }],
    ['no interval', { interval: null }],
    ['an unknown scale', { scale: 'cubic' }],
    ['a contribution without a mass', { contributions: [{ input: 'rig', arm: 1, contribution: 1 }] }],
    ['no reference', { id: undefined }],
  ])('refuses an estimate with %s', async (_, change) => {
    const net = network(200, { ...estimateExample(), ...change });
    expect((await failureOf(client(net).ask('refit-labour', {}))).code).toBe('not-understood');
  });

  it('refuses a description without inputs', async () => {
    const net = network(200, { ...estimatorExample(), inputs: undefined });
    expect((await failureOf(client(net).describe('refit-labour'))).code).toBe('not-understood');
  });
});
