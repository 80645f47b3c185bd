import type { Express } from 'express';
import type { Contract } from '../../service/src/http/contract';
import { startTestService, type TestService } from '../support/test-service';

interface Layer {
  readonly rawPath: unknown;
  readonly route?: { readonly path: unknown; readonly methods: Readonly<Record<string, boolean>> };
  readonly handle: { readonly stack?: readonly Layer[] };
}

interface Found {
  readonly method: string;
  readonly path: string;
}

/** Every route that the application really has, with the paths of the routers above it. */
function routesOf(layers: readonly Layer[], above: string): Found[] {
  return layers.flatMap((layer) => {
    if (layer.route) {
      const path =
        layer.route.path instanceof RegExp ? String(layer.route.path) : `${above}${String(layer.route.path)}`;
      return Object.keys(layer.route.methods).map((method) => ({ method, path }));
    }
    const own = layer.rawPath === '/' ? '' : String(layer.rawPath);
    return layer.handle.stack ? routesOf(layer.handle.stack, above + own) : [];
  });
}

function walk(app: Express): Found[] {
  return routesOf((app.router as unknown as { readonly stack: readonly Layer[] }).stack, '');
}

const named = ({ method, path }: Found): string => `${method.toUpperCase()} ${path}`;

describe('the contract', () => {
  let service: TestService;
  let found: Found[];
  beforeAll(async () => {
    service = await startTestService();
    found = walk(service.app);
  });
  afterAll(() => service.close());

  const listed = (contract: Contract, base: string): string[] =>
    contract.operations.map(({ method, path }) => named({ method, path: base + path })).sort();
  const answered = (base: string): string[] =>
    found
      // What answers 405 at the contract's own paths is no operation.
      .filter(({ method, path }) => method !== '_all' && path.startsWith(`${base}/`))
      .map(named)
      .sort();

  it('and the routes of the desk are the same', () => {
    expect(answered('/api')).toEqual(listed(service.services.deskContract, '/api'));
  });

  it('and the routes for partners are the same', () => {
    expect(answered('/v1')).toEqual(listed(service.services.partnerContract, '/v1'));
  });

  it('answers a method that a path does not take with 405 at every path, and at no other', () => {
    const paths = (contract: Contract, base: string): string[] => contract.operations.map(({ path }) => base + path);
    const expected = new Set([
      ...paths(service.services.deskContract, '/api'),
      ...paths(service.services.partnerContract, '/v1'),
    ]);
    expect(
      found
        .filter(({ method }) => method === '_all')
        .map(({ path }) => path)
        .sort(),
    ).toEqual([...expected].sort());
  });

  it('is all that can change anything: every other route only reads', () => {
    const outside = found.filter(({ path }) => !path.startsWith('/api/') && !path.startsWith('/v1/'));
    expect(outside.length).toBeGreaterThan(0);
    expect(outside.filter(({ method }) => method !== 'get')).toEqual([]);
  });

  it('names the servers’ paths under which the routes are mounted', () => {
    const serverOf = (contract: Contract): unknown => (contract.document['servers'] as { url: string }[])[0].url;
    expect([serverOf(service.services.deskContract), serverOf(service.services.partnerContract)]).toEqual([
      '/api',
      '/v1',
    ]);
  });
});
