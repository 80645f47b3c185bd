import { Router, type Response } from 'express';
import swaggerUi from 'swagger-ui-express';
import { problemKinds } from '../errors';
import type { Contract } from './contract';

const escapeHtml = (text: string): string => text.replace(/[&<>"]/g, (mark) => `&#${mark.charCodeAt(0)};`);

function problemsPage(): string {
  const rows = Object.entries(problemKinds)
    .map(
      ([code, kind]) =>
        `<tr id="${code}"><td><code>${code}</code></td><td>${kind.status}</td><td>${escapeHtml(kind.title)}</td></tr>`,
    )
    .join('\n');
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>Problems</title></head><body>
<h1>Problems</h1><p>Every error is answered as RFC 9457 problem details. Rely on <code>code</code>; <code>detail</code> says what to do this time.</p>
<table><thead><tr><th>Code</th><th>Status</th><th>Meaning</th></tr></thead><tbody>${rows}</tbody></table></body></html>`;
}

/** Swagger UI over both contracts, and the page that problem types point at. Nothing is sent to a validator elsewhere. */
export function documentation(contracts: readonly Contract[]): Router {
  const router = Router();
  for (const contract of contracts) {
    router.get(`/${contract.name}.json`, (_request, response: Response) => void response.json(contract.document));
  }
  router.get('/problems', (_request, response: Response) => void response.type('html').send(problemsPage()));
  const urls = contracts.map((contract) => ({
    name: (contract.document['info'] as { title: string }).title,
    url: `/docs/${contract.name}.json`,
  }));
  router.use('/', swaggerUi.serve);
  router.get(
    '/',
    swaggerUi.setup(undefined, {
      explorer: true,
      customSiteTitle: 'Tarebeam documentation',
      swaggerOptions: { urls, validatorUrl: null },
    }),
  );
  return router;
}
