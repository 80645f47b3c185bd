import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import express, { type Express, type RequestHandler, type Response } from 'express';
import helmet from 'helmet';
import type { Config } from '../config';
import { rootFolder } from '../root-folder';

const folder = join(rootFolder, 'widget', 'partner-page');

/** Which estimator the sample page embeds, with an embed key that lists the page's origin. */
export interface PartnerPageSettings {
  readonly estimator: string;
  readonly key: string;
}

export const partnerPageSettingsPath = (dataFolder: string): string => join(dataFolder, 'partner-page.json');

const escapeAttribute = (text: string): string => text.replace(/[&<>"]/g, (mark) => `&#${mark.charCodeAt(0)};`);

/** Read at every visit, so that a key issued later counts at once. */
function readSettings(dataFolder: string): PartnerPageSettings {
  const path = partnerPageSettingsPath(dataFolder);
  return existsSync(path)
    ? (JSON.parse(readFileSync(path, 'utf8')) as PartnerPageSettings)
    : { estimator: '', key: '' };
}

function fillIn(template: string, values: Readonly<Record<string, string>>): string {
  return template.replace(/\{\{\s*(\w+)\s*\}\}/g, (_whole, name: string) => escapeAttribute(values[name] ?? ''));
}

/** A policy without inline styles lets the form's own pass by this nonce, which the script that loads it carries. */
const giveNonce: RequestHandler = (_request, response, next) => {
  response.locals['nonce'] = randomBytes(16).toString('base64');
  next();
};
const nonceOf = (response: Response): string => String(response.locals['nonce']);

/** A partner's page on an origin of its own, with the strict policy that a careful partner would set. */
export function createPartnerPage(config: Config): Express {
  const app = express();
  app.disable('x-powered-by');
  app.use(
    giveNonce,
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          'default-src': ["'self'"],
          'script-src': ["'self'", config.publicUrl],
          'connect-src': [config.publicUrl],
          'style-src': ["'self'", (_request, response) => `'nonce-${nonceOf(response as Response)}'`],
          'object-src': ["'none'"],
          'base-uri': ["'none'"],
        },
      },
      crossOriginEmbedderPolicy: false,
      strictTransportSecurity: false,
    }),
  );
  app.get('/', (_request, response) => {
    const template = readFileSync(join(folder, 'index.html'), 'utf8');
    const { estimator, key } = readSettings(config.dataFolder);
    response.type('html').setHeader('Cache-Control', 'no-store');
    response.send(fillIn(template, { service: config.publicUrl, estimator, key, nonce: nonceOf(response) }));
  });
  app.use(express.static(folder, { index: false }));
  return app;
}
